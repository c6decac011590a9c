import { BIASES } from './measuredLots';
import type { MeasuredDevice } from './measuredLots';

export interface ExpectedRow {
	readonly bias: string;
	readonly minimum: string;
	readonly typical: string;
	readonly maximum: string;
}

/**
 * One-sided tolerance factor of 60 devices for 99 % content, at (1 + 0.95)/2 since minimum and
 * maximum are promised at once.
 * SciPy 1.10: nct.ppf(0.975, 59, norm.ppf(0.99) * sqrt(60)) / sqrt(60)
 */
const FACTOR_OF_60 = 2.910850718476793;

/** Three significant figures by way of decimal text, so that no binary floor is involved. */
function threeFigures(value: number, way: 'down' | 'nearest' | 'up'): string {
	const decimals = Math.max(0, 2 - Math.floor(Math.log10(value)));
	const [whole = '', rest = ''] = value.toFixed(12).split('.');
	const kept = `${whole}.${rest.slice(0, decimals)}`;
	const dropped = rest.slice(decimals);
	const goesUp = way === 'up' ? /[1-9]/.test(dropped) : way === 'nearest' && dropped >= '5';
	if (!goesUp) return kept.replace(/\.$/, '');
	return (Math.round((Number(kept) + 10 ** -decimals) * 10 ** decimals) / 10 ** decimals).toFixed(
		decimals
	);
}

/** The table by the textbook: mean and deviation of ln C, the factor above, the median. */
export function expectedTable(devices: readonly MeasuredDevice[]): ExpectedRow[] {
	if (devices.length !== 60) throw new Error('the factor is for 60 devices');
	return BIASES.map((bias, column) => {
		const values = devices.map(({ capacitances }) => capacitances[column] ?? Number.NaN);
		const logs = values.map(Math.log);
		const mean = logs.reduce((sum, log) => sum + log, 0) / logs.length;
		const deviation = Math.sqrt(
			logs.reduce((sum, log) => sum + (log - mean) ** 2, 0) / (logs.length - 1)
		);
		const sorted = values.toSorted((a, b) => a - b);
		const median = ((sorted[29] ?? Number.NaN) + (sorted[30] ?? Number.NaN)) / 2;
		return {
			bias: String(bias),
			minimum: threeFigures(Math.exp(mean - FACTOR_OF_60 * deviation), 'down'),
			typical: threeFigures(median, 'nearest'),
			maximum: threeFigures(Math.exp(mean + FACTOR_OF_60 * deviation), 'up')
		};
	});
}
