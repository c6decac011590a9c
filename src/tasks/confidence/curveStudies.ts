import type { BandSides } from '$lib/core/stats/curveSimulator';
import { lotsToleranceHalfWidth, lotsToleranceMargin } from '$lib/core/stats/lotsToleranceMargin';
import type { RandomSource } from '$lib/core/stats/randomSource';
import { tabulatedReach } from '$lib/core/stats/tabulatedReach';
import { wholeCurveWidening } from '$lib/core/stats/wholeCurve';
import { curvePopulation, POINTS, type CurvePopulation, type CurveSample } from './curvePopulation';
import { LOT_SHARES } from './design';
import { drawsFrom } from './draws';
import { PROMISE, type Study } from './study';

const SIZE = 25;

/** Devices of future lots against which a band is held. */
const DEVICES = 200_000;

/** A band that is at least as wide everywhere holds all devices but those listed one by one. */
const CORE = 2.2;

/** Simulations of a calibration: from the known covariances, and from those of one sample. */
const KNOWN = { simulations: 2000, devices: 10_000 };
const PLUGGED_IN = { simulations: 200, devices: 3000 };

/** As many samples as a calibration of its own for each of them leaves time for. */
const AT_MOST = 600;

type Holds = (lower: Float64Array, upper: Float64Array) => boolean;

/** Whether a band holds the content of the devices along the whole curve. */
function holdsDevices(population: CurvePopulation, random: RandomSource): Holds {
	const devices = population.drawDevices(DEVICES, drawsFrom(random));
	const outer = devicesBeyond(devices, CORE);
	const allowed = Math.floor(DEVICES * (1 - PROMISE.content));
	return (lower, upper) => {
		let holdsCore = true;
		for (let p = 0; p < POINTS; p++) if (lower[p]! > -CORE || upper[p]! < CORE) holdsCore = false;
		return countOutside(holdsCore ? outer : devices, lower, upper) <= allowed;
	};
}

/** The devices that are further out than the bound anywhere, one after the other. */
function devicesBeyond(devices: Float64Array, bound: number): Float64Array {
	const rows: number[] = [];
	for (let at = 0; at < devices.length; at += POINTS)
		for (let p = 0; p < POINTS; p++)
			if (Math.abs(devices[at + p]!) > bound) {
				for (let q = 0; q < POINTS; q++) rows.push(devices[at + q]!);
				break;
			}
	return Float64Array.from(rows);
}

function countOutside(devices: Float64Array, lower: Float64Array, upper: Float64Array): number {
	let outside = 0;
	for (let at = 0; at < devices.length; at += POINTS)
		for (let p = 0; p < POINTS; p++) {
			const value = devices[at + p]!;
			if (value < lower[p]! || value > upper[p]!) {
				outside++;
				break;
			}
		}
	return outside;
}

interface BandStudy {
	readonly lots: number;
	readonly lotShare: number;
	readonly isPluggedIn: boolean;
}

function study({ lots, lotShare, isPluggedIn }: BandStudy): Study {
	return {
		method: 'whole curve',
		promises: isPluggedIn ? ['between'] : ['one limit', 'between'],
		shape: `lots of ${SIZE}, ${POINTS} points, ${isPluggedIn ? `estimated covariance, lot share ${lotShare}` : 'known covariance'}`,
		lotSizes: Array.from({ length: lots }, () => SIZE),
		lotShare,
		...(isPluggedIn ? { atMost: AT_MOST } : {}),
		simulate: (random) => {
			const population = curvePopulation(lotShare);
			const draws = drawsFrom(random);
			const holds = holdsDevices(population, random);
			const bands = (isPluggedIn ? (['both'] as const) : (['maximum', 'both'] as const)).map(
				(sides) => bandOf(sides, { lots, lotShare, isPluggedIn }, population, random)
			);
			return () => {
				const sample = population.drawSample(lots, SIZE, draws);
				return bands.map((band) => holds(...band(sample)));
			};
		}
	};
}

type Band = (sample: CurveSample) => readonly [Float64Array, Float64Array];

/** The pointwise limits of a sample, widened for the whole curve. */
function bandOf(
	sides: Exclude<BandSides, 'minimum'>,
	{ lots, isPluggedIn }: BandStudy,
	{ between, within }: CurvePopulation,
	random: RandomSource
): Band {
	const reachOf = sides === 'both' ? lotsToleranceHalfWidth : lotsToleranceMargin;
	const design = { lots, effectiveSize: SIZE, withinDegrees: lots * (SIZE - 1) };
	const reach = tabulatedReach((strata) => reachOf(strata, PROMISE), design);
	const known = {
		...design,
		points: POINTS,
		ofLotMeans: between.map((value, i) => value + within[i]! / SIZE),
		withinLots: within
	};
	const options = { ...PROMISE, sides, random };
	const fixed = isPluggedIn
		? undefined
		: wholeCurveWidening(known, { ...options, ...KNOWN }).widening;
	return ({ means, covariance }) => {
		const widening =
			fixed ?? wholeCurveWidening(covariance, { ...options, ...PLUGGED_IN }).widening;
		const upper = new Float64Array(POINTS);
		const lower = new Float64Array(POINTS);
		for (let p = 0; p < POINTS; p++) {
			const diagonal = p * (POINTS + 1);
			const margin =
				widening * reach(covariance.ofLotMeans[diagonal]!, covariance.withinLots[diagonal]!);
			upper[p] = means[p]! + margin;
			lower[p] = sides === 'both' ? means[p]! - margin : -Infinity;
		}
		return [lower, upper];
	};
}

/**
 * Bands along a whole curve. Known covariance: one calibration for the population, which tries the
 * principle in all cells. Estimated: each sample is calibrated from its own covariances, as the
 * program does, with fewer samples because each costs a simulation of its own.
 */
export const CURVE_STUDIES: readonly Study[] = [
	...LOT_SHARES.flatMap((lotShare) =>
		[3, 8].map((lots) => study({ lots, lotShare, isPluggedIn: false }))
	),
	study({ lots: 3, lotShare: 0.3, isPluggedIn: true }),
	study({ lots: 8, lotShare: 0.6, isPluggedIn: true })
];
