import type { BandPoint } from '$lib/plot/bandChart';
import type { DeviceSweep } from '$lib/plot/capacitanceChart';
import { unpackSweeps, type PackedSweeps } from './packSweeps';

/** The sweeps over a band, and of how many they are a sample. */
export interface SweepSample {
	readonly total: number;
	readonly outside: number;
	readonly sweeps: readonly DeviceSweep[];
}

/** What `cv/band.json` answers. */
export interface Band {
	readonly points: readonly BandPoint[];
}

/** What `cv/sweeps.json` answers: our own endpoint, so its shape is taken as it is declared. */
type PackedSample = Omit<SweepSample, 'sweeps'> & PackedSweeps;

const isSample = (value: unknown): value is PackedSample =>
	typeof value === 'object' && value !== null && 'sweeps' in value && Array.isArray(value.sweeps);
const isBand = (value: unknown): value is Band =>
	typeof value === 'object' && value !== null && 'points' in value && Array.isArray(value.points);

/** The sample of sweeps over a band; `undefined` when it can't be had, and the band stands alone. */
export async function fetchSweeps(
	address: string,
	signal: AbortSignal
): Promise<SweepSample | undefined> {
	const body = await fetchJson(address, signal);
	return isSample(body) ? { ...body, sweeps: unpackSweeps(body) } : undefined;
}

/** The band at and between the measured biases; `undefined` when it can't be had. */
export async function fetchBand(address: string, signal: AbortSignal): Promise<Band | undefined> {
	const body = await fetchJson(address, signal);
	return isBand(body) ? body : undefined;
}

async function fetchJson(address: string, signal: AbortSignal): Promise<unknown> {
	try {
		const response = await fetch(address, { signal });
		return response.ok ? await response.json() : undefined;
	} catch {
		return undefined;
	}
}
