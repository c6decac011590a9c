import { describeCondition } from '$lib/core/characteristics/describeCondition';
import type { LetterSymbol } from '$lib/core/characteristics/symbol';
import type { Censoring, Distribution } from '$lib/core/distributions/summary';
import type { LimitRow } from '$lib/core/limits/limit';
import { characteristicMessages } from '$lib/core/messages/characteristics';
import { gridRow, type GridRow } from '../limits/gridRow';

/** A limit of a characteristic as the page shows it: digits, and what is said of its sample. */
export interface CharacteristicRow extends GridRow {
	/** `V_R = 28 V, 25 °C`. */
	readonly condition: string;
	readonly temperatureCelsius: number;
	/** `4 of 75 at or below the floor`; empty where no device is censored. */
	readonly censored: string;
	/** `at most` or `at least`, where the typical value rests on censored devices. */
	readonly typicalBound: 'atMost' | 'atLeast' | null;
}

/** The rows of one characteristic under its head. */
export interface CharacteristicRows {
	readonly key: string;
	readonly symbol: LetterSymbol;
	readonly name: string;
	readonly unit: string;
	readonly isDerived: boolean;
	readonly rows: readonly CharacteristicRow[];
}

export function characteristicRow(
	row: LimitRow,
	distribution: Distribution | undefined
): CharacteristicRow {
	return {
		...gridRow(row),
		condition: describeCondition(row.condition),
		temperatureCelsius: row.condition.temperatureCelsius,
		censored: censoredText(distribution?.censoring, row.sampleSize),
		typicalBound:
			distribution?.quantiles.find(({ probability }) => probability === 0.5)?.bound ?? null
	};
}

/** How many devices are censored, in words. */
export function censoredText(censoring: Censoring | undefined, sampleSize: number): string {
	return censoring === undefined
		? ''
		: characteristicMessages.censored(censoring.atOrBelow, censoring.atOrAbove, sampleSize);
}
