import { screenedMessages as say } from '../../messages/screened';
import type { RequestProblem } from '../../requestProblems';
import { mean } from '../../stats/mean';
import { lineFromMoments, regressionLine, type RegressionLine } from '../../stats/regressionLine';
import { standardDeviation } from '../../stats/standardDeviation';
import type { ScreenedRequest } from './screenedRequest';

/** Devices measured at both conditions, transformed. */
export interface Pairs {
	readonly x: readonly number[];
	readonly y: readonly number[];
	readonly groups?: readonly (string | number)[];
}

/** What is known of the tested quantity x and the limited y, transformed. */
export interface ScreenedSource {
	/** `null` for known parameters. */
	readonly sampleSize: number | null;
	readonly meanX: number;
	readonly meanY: number;
	readonly deviationX: number;
	readonly deviationY: number;
	readonly correlation: number;
	/** `null` for known parameters. */
	readonly line: RegressionLine | null;
	/** The devices themselves, where they were sent. */
	readonly pairs?: Pairs;
	/** Lowest and highest characterized x. */
	readonly range?: readonly [number, number];
}

export type SourceOutcome =
	| { readonly status: 'read'; readonly source: ScreenedSource }
	| { readonly status: 'refused'; readonly problems: readonly RequestProblem[] };

const refused = (...problems: RequestProblem[]): SourceOutcome => ({ status: 'refused', problems });

/** Pairs or moments of a request, brought to one form. */
export function screenedSource(request: ScreenedRequest): SourceOutcome {
	if (request.quantity === 'ratio' && request.transform !== 'ln')
		return refused({ path: 'transform', message: say.ratioNeedsLogarithms() });
	return request.tested === undefined ? fromMoments(request) : fromPairs(request, request.tested);
}

function fromPairs(request: ScreenedRequest, tested: readonly number[]): SourceOutcome {
	const { limited, groups, transform, quantity } = request;
	if (limited === undefined) return refused({ path: 'limited', message: say.limitedMissing() });
	const problems = [
		...lengthProblem('limited', tested.length, limited.length),
		...(groups === undefined ? [] : lengthProblem('groups', tested.length, groups.length)),
		...(transform === 'ln' ? logarithmProblems({ tested, limited }) : [])
	];
	if (problems.length > 0) return refused(...problems);
	if (tested.length < 3) return refused({ path: 'tested', message: say.fewPairs(tested.length) });
	const transformed = transform === 'ln' ? Math.log : (value: number) => value;
	const x = tested.map(transformed);
	const plain = limited.map(transformed);
	const y = quantity === 'ratio' ? x.map((value, i) => value - plain[i]!) : plain;
	const deviationX = standardDeviation(x);
	if (!(deviationX > 0)) return refused({ path: 'tested', message: say.noSpread() });
	const line = regressionLine(x, y);
	return {
		status: 'read',
		source: {
			...{ sampleSize: x.length, meanX: mean(x), meanY: mean(y), deviationX, line },
			deviationY: standardDeviation(y),
			correlation: line.correlation,
			pairs: groups === undefined ? { x, y } : { x, y, groups },
			range: [
				x.reduce((least, value) => Math.min(least, value), Infinity),
				x.reduce((most, value) => Math.max(most, value), -Infinity)
			]
		}
	};
}

function lengthProblem(path: string, tested: number, other: number): RequestProblem[] {
	return tested === other ? [] : [{ path, message: say.lengthsDiffer(tested, other) }];
}

function logarithmProblems(
	named: Readonly<Record<string, readonly number[] | undefined>>
): RequestProblem[] {
	return Object.entries(named).flatMap(([name, values = []]) =>
		values.flatMap((value, i) =>
			value > 0 ? [] : [{ path: `${name}[${i}]`, message: say.noLogarithm(value) }]
		)
	);
}

function fromMoments(request: ScreenedRequest): SourceOutcome {
	const { means, deviations, correlation, quantity, transform, testedRange } = request;
	if (means === undefined || deviations === undefined || correlation === undefined) {
		const missing = Object.entries({ deviations, correlation }).filter(
			([, of]) => of === undefined
		);
		return refused(...missing.map(([path]) => ({ path, message: say.momentMissing() })));
	}
	const problems =
		testedRange !== undefined && transform === 'ln' ? logarithmProblems({ testedRange }) : [];
	if (problems.length > 0) return refused(...problems);
	const sampleSize = request.n ?? null;
	if (sampleSize === null && Math.abs(correlation) === 1)
		return refused({ path: 'correlation', message: say.fullCorrelation() });
	const [meanX, meanY] = means;
	const [deviationX, deviationY] = deviations;
	const moments = { meanX, meanY, deviationX, deviationY, correlation };
	const used = quantity === 'ratio' ? ratioMoments(moments) : moments;
	if (!(used.deviationY > 0))
		return refused({ path: 'deviations', message: say.noSpreadOfRatio() });
	const transformed = (value: number) => (transform === 'ln' ? Math.log(value) : value);
	return {
		status: 'read',
		source: {
			...used,
			sampleSize,
			line: sampleSize === null ? null : lineFromMoments({ ...used, sampleSize }),
			...(testedRange === undefined
				? {}
				: { range: [transformed(testedRange[0]), transformed(testedRange[1])] as const })
		}
	};
}

type Moments = Pick<
	ScreenedSource,
	'meanX' | 'meanY' | 'deviationX' | 'deviationY' | 'correlation'
>;

/** Moments of x and x − y from those of x and y. */
function ratioMoments({ meanX, meanY, deviationX, deviationY, correlation }: Moments): Moments {
	const shared = correlation * deviationX * deviationY;
	const variance = deviationX ** 2 + deviationY ** 2 - 2 * shared;
	const deviation = Math.sqrt(Math.max(0, variance));
	const covariance = deviationX ** 2 - shared;
	return {
		...{ meanX, deviationX, meanY: meanX - meanY, deviationY: deviation },
		correlation:
			deviation > 0 ? Math.min(1, Math.max(-1, covariance / (deviationX * deviation))) : 0
	};
}
