import type { DistributionComponents } from '$lib/core/distributions/summary';

/** What a level of the lots' tree adds to the spread. */
export interface ComponentShare {
	readonly level:
		| 'between lots'
		| 'between wafers of a lot'
		| 'between devices of a wafer'
		| 'between devices of a lot';
	/** Of the variance, in %. */
	readonly sharePercent: number;
	/** Relative standard deviation in %. */
	readonly deviationPercent: number;
	/** Whether the estimate was negative, and is shown as 0. */
	readonly isNegative: boolean;
}

/** Shares of the variance of ln C, lots first; wafers only where they are a level of their own. */
export function componentShares({
	lot,
	wafer,
	device,
	total
}: DistributionComponents): ComponentShare[] {
	const share = (
		level: ComponentShare['level'],
		{ variance, isNegative }: DistributionComponents['lot']
	): ComponentShare => ({
		level,
		sharePercent: total > 0 ? (variance / total) * 100 : 0,
		deviationPercent: Math.sqrt(variance) * 100,
		isNegative
	});
	return [
		share('between lots', lot),
		...(wafer === null ? [] : [share('between wafers of a lot', wafer)]),
		share(wafer === null ? 'between devices of a lot' : 'between devices of a wafer', device)
	];
}
