import type { HistogramBar } from '../../distributions/histogram';
import type { TestYield } from '../limit';
import type { SpreadByLot } from '../spreadByLot';
import type { Comparison, Difference } from './compareLimits';

/** The printed digits of one set of limits, in the unit of the table. */
export interface PrintedLimits {
	readonly minimum: string | null;
	readonly typical: string | null;
	readonly maximum: string | null;
	/** Of the production test; absent where there is none. */
	readonly test?: { readonly minimum: string | null; readonly maximum: string | null };
	readonly testYield?: TestYield;
}

export interface WhatIfAnswerRow {
	readonly key: string;
	/** Reverse bias in V. */
	readonly bias: number;
	readonly stored: PrintedLimits;
	readonly tried: PrintedLimits;
	readonly minimum: Comparison;
	readonly maximum: Comparison;
	readonly sampleSize: number;
	readonly independentLots: number;
	readonly refusals: readonly string[];
	readonly warnings: readonly string[];
	/** Devices needed a side, where more devices would do. */
	readonly requiredSampleSize: number | null;
}

/** How the stored devices of one condition lie, in the unit of the table. */
export interface WhatIfFigure extends SpreadByLot {
	readonly key: string;
	readonly bars: readonly HistogramBar[];
}

/** What a trial answers: the limits of one temperature beside the stored ones. */
export interface WhatIfAnswer {
	readonly policy: { readonly id: number; readonly name: string; readonly number: number };
	readonly unit: string;
	readonly temperatureCelsius: number;
	/** Hz */
	readonly frequency: number | null;
	/** Wafer lots that were left out. */
	readonly lotsOut: readonly string[];
	readonly counts: Readonly<Record<Difference, number>>;
	/** What to know of the trial as a whole. */
	readonly notes: readonly string[];
	readonly rows: readonly WhatIfAnswerRow[];
	/** `null` where no condition was asked for. */
	readonly figure: WhatIfFigure | null;
}
