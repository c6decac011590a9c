import { z } from 'zod';

/** How a set was measured, as far as the file does not say it itself. */
export const measurementSetup = z.object({
	instrument: z.string().trim().max(200).default(''),
	/** Test signal, rms. */
	signalLevelVolts: z.number().positive().nullable().default(null),
	/** For files without a column for it. */
	frequencyHertz: z.number().positive().nullable().default(null),
	/** For files without a column for it. */
	temperatureCelsius: z.number().min(-273.15).nullable().default(null),
	/** Stated systematic uncertainty U, relative: 0.003 is 0.3 %. `null` = not stated. */
	uncertainty: z.number().min(0).lt(1).nullable().default(null),
	/** Lots that come from one wafer lot; a lot that isn't listed is its own. */
	waferLots: z
		.array(z.object({ lot: z.string().trim().min(1), waferLot: z.string().trim().min(1) }))
		.default([]),
	note: z.string().trim().max(2000).default('')
});
export type MeasurementSetup = z.infer<typeof measurementSetup>;

/** A set-up in which nothing is stated. */
export const EMPTY_SETUP: MeasurementSetup = measurementSetup.parse({});
