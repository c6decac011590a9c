import { readNumber } from '$lib/core/units/readNumber';
import type { Connection } from '$lib/server/db/database';
import { capacitanceCurve, type CapacitanceCurve } from '$lib/server/services/capacitanceCurve';
import { limitsChoice, type LimitsChoice } from '$lib/server/services/limitsChoice';

/** The curve that an address asks for, and by which policy; `curve` is missing without data. */
export async function curveOf(
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
