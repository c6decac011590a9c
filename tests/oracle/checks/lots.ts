import { fQuantile } from '../../../src/lib/core/stats/fDistribution';
import { groupSums } from '../../../src/lib/core/stats/groupSums';
import { nestedStrata, oneWayStrata } from '../../../src/lib/core/stats/lotStrata';
import {
	lotsToleranceHalfWidth,
	lotsToleranceMargin
} from '../../../src/lib/core/stats/lotsToleranceMargin';
import { meeOwenBasis, meeOwenHalfWidth, meeOwenMargin } from '../../../src/lib/core/stats/meeOwen';
import {
	moverHalfWidth,
	moverMargin,
	varianceSumUpperBound
} from '../../../src/lib/core/stats/moverMargin';
import { standardDeviation } from '../../../src/lib/core/stats/standardDeviation';
import { oneSidedToleranceFactor } from '../../../src/lib/core/stats/toleranceFactor';
import {
	lotComponents,
	nestedComponents,
	poolGroups
} from '../../../src/lib/core/stats/varianceComponents';
import { identifier, quantity, type Check } from '../check';
import { numberAt, promiseOf, textAt, type Row } from '../rows';
import { columnOf, nestedSums, oneWayGroups, waferGroups } from '../tables';

const sums = (row: Row) => oneWayGroups(textAt(row.inputs, 'dataset')).map(groupSums);
const components = (row: Row) => lotComponents(sums(row));
const strata = (row: Row) => oneWayStrata(sums(row));
const ending = (row: Row) => row.id.split('-').at(-1);

const nested = (row: Row) =>
	nestedComponents(
		nestedSums(
			textAt(row.inputs, 'dataset'),
			row.inputs['scale'] === 'log' ? Math.log : (value) => value
		)
	);
const oxide = () => nestedStrata(nestedSums('oxide.csv'));

const wafer = (row: Row) => {
	const isLog = row.quantity.includes('log_');
	const groups = waferGroups(numberAt(row.inputs, 'voltage'), isLog ? Math.log : (v) => v);
	return lotComponents(groups.map(groupSums));
};

/** One end of the two-sided 95 % interval of σ_b²/σ_w², by the F distribution. */
function ratioBound(row: Row, probability: number): number {
	const { fRatio, between, within, effectiveLotSize } = components(row);
	const f = fQuantile(probability, { numerator: between.degrees, denominator: within.degrees });
	return (fRatio / f - 1) / effectiveLotSize;
}

const MARGINS = { MeeOwen: meeOwenMargin, GV: lotsToleranceMargin, MOVER: moverMargin } as const;
const HALF_WIDTHS = {
	Mee84: meeOwenHalfWidth,
	GV2: lotsToleranceHalfWidth,
	MLS2: moverHalfWidth
} as const;

/** One method for the rows that name it. */
const methodChecks: readonly Check[] = [
	...Object.entries(MARGINS).map(([method, margin]) => ({
		name: `one-sided limit for lots by ${method}`,
		covers: quantity('D', `one-sided lower tolerance limit ybar - margin, method ${method}`),
		value: (row: Row) => strata(row).mean - margin(strata(row), promiseOf(row.inputs))
	})),
	...Object.entries(HALF_WIDTHS).map(([method, halfWidth]) => ({
		name: `two-sided limit for lots by ${method}`,
		covers: quantity(
			'D',
			`two-sided tolerance half-width (interval ybar +- value), method ${method}`
		),
		value: (row: Row) => halfWidth(strata(row), promiseOf(row.inputs))
	}))
];

const NESTED_VALUES: Readonly<Record<string, (row: Row) => number>> = {
	m: (row) => nested(row).mean,
	ssA: (row) => nested(row).betweenLots.sumOfSquares,
	ssB: (row) => nested(row).betweenWafers.sumOfSquares,
	ssE: (row) => nested(row).withinWafers.sumOfSquares,
	msA: (row) => nested(row).betweenLots.meanSquare,
	msB: (row) => nested(row).betweenWafers.meanSquare,
	msE: (row) => nested(row).withinWafers.meanSquare,
	s2A: (row) => nested(row).lot.estimate,
	s2B: (row) => nested(row).wafer.estimate,
	s2E: (row) => nested(row).device.estimate,
	s2T: (row) => nested(row).total,
	F_A: (row) => nested(row).betweenLots.meanSquare / nested(row).betweenWafers.meanSquare,
	F_B: (row) => nested(row).betweenWafers.meanSquare / nested(row).withinWafers.meanSquare,
	F_A_random: (row) => nested(row).betweenLots.meanSquare / nested(row).betweenWafers.meanSquare,
	sd_mean: (row) => Math.sqrt(nested(row).betweenLots.meanSquare / nested(row).sampleSize),
	sd_pooled: () => standardDeviation(columnOf('oxide.csv', 'Thickness'))
};

const ONE_WAY_VALUES: Readonly<Record<string, (row: Row) => number>> = {
	ybar: (row) => strata(row).mean,
	mean: (row) => components(row).mean,
	MSB: (row) => components(row).between.meanSquare,
	MSE: (row) => components(row).within.meanSquare,
	SSB: (row) => components(row).between.sumOfSquares,
	SSW: (row) => components(row).within.sumOfSquares,
	s2b: (row) => components(row).lot.estimate,
	msA: (row) => components(row).between.meanSquare,
	msE: (row) => components(row).within.meanSquare,
	msB: (row) => components(row).between.meanSquare,
	msW: (row) => components(row).within.meanSquare,
	ssB: (row) => components(row).between.sumOfSquares,
	s2A: (row) => components(row).lot.estimate,
	F: (row) => components(row).fRatio,
	p: (row) => components(row).pValue,
	R2: (row) => {
		const { between, within } = components(row);
		return between.sumOfSquares / (between.sumOfSquares + within.sumOfSquares);
	},
	ratio_lo: (row) => ratioBound(row, 0.975),
	ratio_hi: (row) => ratioBound(row, 0.025),
	S: (row) => {
		const { effectiveLotSize: size, between, within } = components(row);
		return Math.sqrt(between.meanSquare / size + (1 - 1 / size) * within.meanSquare);
	},
	R: (row) => meeOwenBasis(strata(row), 0.95).varianceRatio,
	f: (row) => meeOwenBasis(strata(row), 0.95).degrees,
	ntilde: (row) => meeOwenBasis(strata(row), 0.95).effectiveSampleSize
};

const WAFER_VALUES: Readonly<Record<string, (row: Row) => number>> = {
	mean: (row) => wafer(row).mean,
	log_mean: (row) => wafer(row).mean,
	msA: (row) => wafer(row).between.meanSquare,
	msE: (row) => wafer(row).within.meanSquare,
	s2A: (row) => wafer(row).lot.estimate,
	log_msA: (row) => wafer(row).between.meanSquare,
	log_msE: (row) => wafer(row).within.meanSquare
};

const fromTable = (
	name: string,
	prefix: RegExp,
	table: Readonly<Record<string, (row: Row) => number>>
): Check => ({
	name,
	covers: (row) => prefix.test(row.id) && Object.hasOwn(table, ending(row) ?? ''),
	value: (row) => table[ending(row) ?? '']?.(row) ?? NaN
});

/** Where the design is balanced and no component negative, REML is the analysis of variance. */
const BALANCED_REML: Readonly<Record<string, (row: Row) => number>> = {
	'E-oxide-lmer_lot_var': () => nestedComponents(nestedSums('oxide.csv')).lot.estimate,
	'E-oxide-lmer_wafer_var': () => nestedComponents(nestedSums('oxide.csv')).wafer.estimate,
	'E-oxide-lmer_res_var': () => nestedComponents(nestedSums('oxide.csv')).device.estimate,
	'E-oxide-fixed_se': () =>
		Math.sqrt(nestedComponents(nestedSums('oxide.csv')).betweenLots.meanSquare / 72),
	'E-pb-oxide-sd_wafer_in_lot': () =>
		Math.sqrt(nestedComponents(nestedSums('oxide.csv')).wafer.estimate),
	'E-pb-oxide-sd_residual': () =>
		Math.sqrt(nestedComponents(nestedSums('oxide.csv')).device.estimate),
	'E-pb-oxide-mean': () => nestedComponents(nestedSums('oxide.csv')).mean,
	'E-pastes-reml_sample_var': () => nestedComponents(nestedSums('pastes.csv')).wafer.estimate,
	'E-pastes-reml_res_var': () => nestedComponents(nestedSums('pastes.csv')).device.estimate,
	'E-dyestuff-reml_batch_var': (row) => components(row).lot.estimate,
	'E-dyestuff2-reml_batch_var': (row) => components(row).lot.variance
};

/** Areas D and E: variance components, and limits for future lots. */
export const LOT_CHECKS: readonly Check[] = [
	...methodChecks,
	fromTable('one-way components', /^(D-ETW2|D-KM41|E-dyestuff2?|E-strd-sirstv)-/, ONE_WAY_VALUES),
	fromTable('nested components', /^E-(oxide|oxide_log|pastes|nist-nested)-/, NESTED_VALUES),
	fromTable('components of wafers', /^E-wafer_/, WAFER_VALUES),
	{
		name: 'components by likelihood where they are those of the analysis of variance',
		covers: (row) => Object.hasOwn(BALANCED_REML, row.id),
		value: (row) => BALANCED_REML[row.id]?.(row) ?? NaN
	},
	{
		name: 'what a limit that ignores lots would be',
		covers: identifier(/^D-KM41-naive/),
		value: (row) => {
			const values = oneWayGroups('km41.csv').flat();
			const pooled = poolGroups([groupSums(values)]);
			const deviation = Math.sqrt(pooled.sumOfSquares / (values.length - 1));
			return (
				pooled.mean - oneSidedToleranceFactor(values.length, promiseOf(row.inputs)) * deviation
			);
		}
	},
	{
		name: 'nested limit by generalized variables',
		covers: identifier(/^E-oxide-tol-GV-/),
		value: ({ inputs }) => lotsToleranceMargin(oxide(), promiseOf(inputs))
	},
	{
		name: 'nested limit by the closed form',
		covers: identifier(/^E-oxide-tol-MOVER-/),
		value: ({ inputs }) => moverMargin(oxide(), promiseOf(inputs))
	},
	{
		name: 'nested two-sided limit by the closed form',
		covers: identifier(/^E-oxide-tol-MLS2-/),
		value: ({ inputs }) => moverHalfWidth(oxide(), promiseOf(inputs))
	},
	{
		name: 'bound of the total variance',
		covers: identifier(/^E-oxide-mls-total/),
		value: ({ inputs }) => varianceSumUpperBound(oxide().strata, numberAt(inputs, 'confidence'))
	},
	{
		name: 'Mee–Owen with the wafers of a lot taken as one',
		covers: identifier(/^E-oxide-tol-MeeOwen-lotsonly/),
		value: ({ inputs }) =>
			meeOwenMargin(oneWayStrata(nestedSums('oxide.csv').map(poolGroups)), promiseOf(inputs))
	},
	{
		name: 'size of the unbalanced data set',
		covers: identifier(/^E-oxide_unbalanced-N$/),
		value: () => {
			const keep = (line: Readonly<Record<string, string>>) =>
				!(line['Lot'] === '1' && line['Wafer'] === '3') &&
				!(line['Lot'] === '5' && line['Site'] === '3');
			return nestedComponents(nestedSums('oxide.csv', (value) => value, keep)).sampleSize;
		}
	}
];
