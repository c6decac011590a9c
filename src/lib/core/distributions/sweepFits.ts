import { z } from 'zod';
import { PARAMETERS } from '../junction/capacitanceFitResult';

/** What is summed up over devices: the parameters of the law, and how far the readings are from it. */
export const FITTED = [...PARAMETERS, 'residualRms'] as const;
export type Fitted = (typeof FITTED)[number];

const distributionOfFits = z.object({
	name: z.enum(FITTED),
	/** Type 8; SI units, the residual as a share. */
	quantiles: z.array(z.object({ probability: z.number(), value: z.number() })),
	/** Devices between each edge and the next. */
	bars: z.array(z.object({ lower: z.number(), upper: z.number(), count: z.number().int() })),
	/** Median of each independent lot; `null` where none of its devices counts. */
	lots: z.array(z.object({ name: z.string(), median: z.number().nullable() })),
	/** Devices at a bound of this parameter. */
	atBound: z.number().int()
});
export type DistributionOfFits = z.infer<typeof distributionOfFits>;

/** A device whose readings are far from the law. */
const worstFit = z.object({
	device: z.number().int(),
	lot: z.string(),
	wafer: z.string(),
	/** Site, element and name as the file states them. */
	name: z.string(),
	residualRms: z.number(),
	identifiable: z.boolean(),
	boundsHit: z.array(z.enum(PARAMETERS))
});
export type WorstFit = z.infer<typeof worstFit>;

/** The median at each bias: of all devices, or of an independent lot; `null` where nobody measured. */
const medianSweep = z.object({
	name: z.string(),
	devices: z.number().int(),
	capacitances: z.array(z.number().nullable())
});
export type MedianSweep = z.infer<typeof medianSweep>;

/** The fitted laws of all devices at one temperature and frequency, without the devices. */
export const sweepFits = z.object({
	/** Devices with a sweep here that counts. */
	devices: z.number().int(),
	/** Those with fewer readings than parameters. */
	tooFewReadings: z.number().int(),
	/** Those whose readings don't tell the parameters apart: in the residuals only. */
	notIdentifiable: z.number().int(),
	/** Those whose fit did not end: in the residuals only. */
	notConverged: z.number().int(),
	parameters: z.array(distributionOfFits),
	worst: z.array(worstFit),
	/** In V, ascending. */
	biases: z.array(z.number()),
	/** In F. */
	all: medianSweep,
	lots: z.array(medianSweep)
});
export type SweepFits = z.infer<typeof sweepFits>;
