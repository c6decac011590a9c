import type { DeviceSweep } from '$lib/plot/capacitanceChart';

/** What `cv/sweeps.json` answers: our own endpoint, so its shape is taken as it is declared. */
export interface SweepSample {
	readonly total: number;
	readonly outside: number;
	readonly sweeps: readonly DeviceSweep[];
}

const isSample = (value: unknown): value is SweepSample =>
	typeof value === 'object' && value !== null && 'sweeps' in value && Array.isArray(value.sweeps);

/** The sample of sweeps behind a band; `undefined` when it can't be had, and the band stands alone. */
export async function fetchSweeps(
	address: string,
	signal: AbortSignal
): Promise<SweepSample | undefined> {
	try {
		const response = await fetch(address, { signal });
		const body: unknown = response.ok ? await response.json() : undefined;
		return isSample(body) ? body : undefined;
	} catch {
		return undefined;
	}
}
