import type { Condition } from '../characteristics/condition';
import type { Distribution } from '../distributions/summary';
import type { DerivationStep } from './limit';
import { percent } from './digits';

/** The first lines of every derivation: what was measured, and what of it counts. */
export function sampleSteps(distribution: Distribution, condition: Condition): DerivationStep[] {
	const { sets, sampleSize, excluded, quarantined } = distribution;
	if (sets.length === 0) return [givenStep(distribution)];
	const measured = sampleSize + excluded + quarantined;
	return [
		{
			name: 'Measurement sets',
			method: `${listed(sets.length === 1 ? 'Set' : 'Sets', sets)}, at ${conditionText(condition, distribution)}. ${uncertaintyText(distribution.uncertainty)}`,
			value: measured,
			unit: 'sweeps',
			text: String(measured)
		},
		{
			name: 'Verdicts',
			method: `${excluded} excluded by verdict, ${quarantined} in quarantine and left out. The devices come from ${counted(distribution.independentLots, 'independent lot')} and ${counted(distribution.wafers, 'wafer')}.`,
			value: sampleSize,
			unit: 'devices',
			text: String(sampleSize)
		}
	];
}

/** Values that came without a measurement set. */
function givenStep({ origin, sampleSize }: Distribution): DerivationStep {
	return {
		name: origin === 'entered' ? 'Entered summary' : 'Values',
		method:
			origin === 'entered'
				? 'Mean and standard deviation as entered; no measured devices stand behind them.'
				: 'As they were given; no measurement set stands behind them.',
		value: sampleSize,
		unit: 'devices',
		text: String(sampleSize)
	};
}

function uncertaintyText(uncertainty: number | null): string {
	return uncertainty === null
		? 'No set states its uncertainty.'
		: `Largest stated uncertainty U\u00a0=\u00a0${percent(uncertainty)}.`;
}

function conditionText(
	{ temperatureCelsius, frequency, reverseVoltage }: Condition,
	{ interpolated, junctionPotential }: Distribution
): string {
	const along = junctionPotential === undefined ? 'V_R' : `V_R + ${junctionPotential}\u00a0V`;
	const bias = interpolated
		? `values interpolated within each sweep (against ln(${along})) to`
		: 'the measured';
	return [
		...(reverseVoltage === undefined ? [] : [`${bias} ${signed(reverseVoltage)}\u00a0V`]),
		`${signed(temperatureCelsius)}\u00a0°C`,
		...(frequency === undefined ? [] : [`${frequency / 1e6}\u00a0MHz`])
	].join(', ');
}

function signed(value: number): string {
	return String(value).replace('-', '\u2212');
}

function listed(word: string, numbers: readonly number[]): string {
	return `${word} ${numbers.join(', ')}`;
}

function counted(count: number, noun: string): string {
	return `${count} ${noun}${count === 1 ? '' : 's'}`;
}
