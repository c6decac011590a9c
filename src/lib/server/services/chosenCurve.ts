import { readNumber } from '$lib/core/units/readNumber';
import type { Connection } from '../db/database';
import { capacitanceCurve, type CapacitanceCurve } from './capacitanceCurve';
import { limitsChoice, type LimitsChoice } from './limitsChoice';

/** The curve that an address asks for, and by which policy; `curve` is missing without data. */
export async function chosenCurve(
	db: Connection,
	product: { readonly id: number; readonly basisHash: string | null },
	search: URLSearchParams
): Promise<{ readonly choice: LimitsChoice; readonly curve: CapacitanceCurve | undefined }> {
	const choice = await limitsChoice(db, search);
	const { policy, basis } = choice;
	const curve =
		product.basisHash === null || policy === undefined
			? undefined
			: await capacitanceCurve(db, {
					product: product.id,
					basisHash: product.basisHash,
					policyVersion: policy.id,
					declaredBasis: basis,
					temperatureCelsius: readNumber(search.get('temperatureCelsius') ?? ''),
					frequency: readNumber(search.get('frequency') ?? '')
				});
	return { choice, curve };
}
