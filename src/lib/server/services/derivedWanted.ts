import { findCharacteristic } from '$lib/core/characteristics/catalogue';
import type { LimitSlot, Template } from '$lib/core/template/template';
import type { Database } from '../db/database';
import { templatesOf } from './templateBiases';

/** At which biases, in V, derived characteristics are computed; only where they were measured. */
export interface DerivedWanted {
	/** C(V_1)/C(V_2). */
	readonly ratios: readonly (readonly [low: number, high: number])[];
	/** Charge and energy from 0 V, beside those to the highest bias measured. */
	readonly charges: readonly number[];
	/** Temperature coefficients. */
	readonly coefficients: readonly number[];
}

/** The customary ratio of a tuning diode, and a bias in the middle of its range: from memory. */
const ALWAYS: DerivedWanted = { ratios: [[1, 28]], charges: [], coefficients: [4] };

/** What the slots of a product's templates name, and what is always computed. */
export async function derivedWanted(db: Database, productId: number): Promise<DerivedWanted> {
	const slots = (await templatesOf(db, productId)).flatMap(derivedSlots);
	const biasesOf = (...keys: string[]) =>
		slots.flatMap(({ characteristic, reverseVoltage }) =>
			keys.includes(characteristic) && reverseVoltage !== undefined ? [reverseVoltage] : []
		);
	const ratios = slots.flatMap(
		({ characteristic, reverseVoltage: low, secondReverseVoltage: high }) =>
			characteristic === 'C_ratio' && low !== undefined && high !== undefined
				? [[low, high] as const]
				: []
	);
	const differing = new Map([...ALWAYS.ratios, ...ratios].map((of) => [of.join(' '), of]));
	return {
		ratios: [...differing.values()],
		charges: [...new Set([...ALWAYS.charges, ...biasesOf('Q_C', 'E_C')])],
		coefficients: [...new Set([...ALWAYS.coefficients, ...biasesOf('α_C')])]
	};
}

function derivedSlots({ sections }: Template): LimitSlot[] {
	return sections.flatMap((section) =>
		section.kind === 'characteristics'
			? section.slots.filter(
					({ characteristic }) => findCharacteristic(characteristic)?.measuredAs === 'derived'
				)
			: []
	);
}
