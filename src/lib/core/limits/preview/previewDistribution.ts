import { computeDistribution } from '../../distributions/computeDistribution';
import { enteredDistribution } from '../../distributions/enteredDistribution';
import type { Distribution, Transform } from '../../distributions/summary';
import { limitMessages } from '../../messages/limits';
import type { PreviewRequest } from './previewRequest';

export type PreviewDistribution =
	| { readonly status: 'made'; readonly distribution: Distribution }
	| { readonly status: 'refused'; readonly message: string };

const WHERE = { characteristic: 'value', conditionKey: 'T=25', unit: '' } as const;

/** The distribution that a request speaks of; a logarithm of what has none is refused with its place. */
export function previewDistribution(request: PreviewRequest): PreviewDistribution {
	const { distribution: entered, transform } = request;
	if (entered !== undefined) {
		return {
			status: 'made',
			distribution: enteredDistribution({ ...WHERE, ...entered, transform })
		};
	}
	const samples = samplesOf(request);
	for (const { place, values } of samples) {
		const at = firstWithout(transform, values);
		if (at >= 0) {
			const message = limitMessages.noLogarithm(`${place}[${at}]`, transform, values[at] ?? NaN);
			return { status: 'refused', message };
		}
	}
	const distribution = computeDistribution({
		...WHERE,
		transform,
		values: Float64Array.from(samples.flatMap(({ values }) => [...values])),
		groupOf: Int32Array.from(samples.flatMap(({ values }, group) => values.map(() => group))),
		groups: samples.map(({ lot, wafer }) => ({ lot, waferLot: lot, wafer })),
		sets: [],
		uncertainty: null,
		excluded: 0,
		quarantined: 0
	});
	if (distribution === undefined) throw new RangeError('the request holds no value');
	return { status: 'made', distribution };
}

interface Sample {
	/** Where in the request it stands. */
	readonly place: string;
	readonly lot: string;
	readonly wafer: string;
	readonly values: readonly number[];
}

function samplesOf({ values, groups, nestedGroups }: PreviewRequest): Sample[] {
	if (nestedGroups !== undefined) {
		return nestedGroups.flatMap((wafers, lot) =>
			wafers.map((of, wafer) => ({
				place: `nestedGroups[${lot}][${wafer}]`,
				lot: name(lot),
				wafer: name(wafer),
				values: of
			}))
		);
	}
	if (groups !== undefined) {
		return groups.map((of, lot) => ({
			place: `groups[${lot}]`,
			lot: name(lot),
			wafer: name(0),
			values: of
		}));
	}
	return [{ place: 'values', lot: name(0), wafer: name(0), values: values ?? [] }];
}

/** Names that sort as they come. */
const name = (index: number) => String(index + 1).padStart(4, '0');

function firstWithout(transform: Transform, values: readonly number[]): number {
	return transform === 'identity' ? -1 : values.findIndex((value) => value <= 0);
}
