import { roundInward, type Rounded } from '../units/rounding';
import { moveInwards, type Allowance, type Side } from './allowance';
import { allowanceText } from './allowanceText';
import { significant, withoutNoise } from './digits';
import { driftOn } from './drift';
import type { DerivationStep, TestLimit } from './limit';
import type { LimitPolicy, Resolution } from './policy';
import { resolutionText } from './resolutionText';

export interface TestLimitOptions {
	readonly side: Side;
	readonly rules: Pick<LimitPolicy, 'drift' | 'guardBand' | 'resolution' | 'testResolution'>;
	/** Expanded uncertainty U of the tester. */
	readonly uncertainty: Allowance;
	readonly unit: string;
	readonly unitScale: number;
}

/** r where a policy states none: the whole uncertainty is kept as a guard band. */
export const DEFAULT_GUARD_BAND = 1;

/**
 * The limit of the production test behind a printed one: printed → drift allowance inwards → guard
 * band r·U inwards → rounded inwards, so that a device that passes keeps the printed limit after its
 * drift, also when the tester reads it wrong by r·U.
 *
 * Source of the guard band: JCGM 106:2012, section 8.3.
 *
 * @param printed in the unit of the table
 */
export function testLimit(printed: number, options: TestLimitOptions): TestLimit {
	const { side, rules, uncertainty, unitScale, unit } = options;
	const drift = driftOn(rules, side);
	const { guardBand = DEFAULT_GUARD_BAND } = rules;
	const afterDrift = moveInwards(printed, side, { by: drift, unitScale });
	const sign = side === 'minimum' ? 1 : -1;
	const width = guardBand * amountOf(uncertainty, afterDrift, unitScale);
	const guarded = withoutNoise(afterDrift + sign * width);
	const to = rules.testResolution ?? finer(rules.resolution);
	const rounded = roundInward(guarded, side, to);
	return {
		value: rounded.value * unitScale,
		text: rounded.text,
		derivation: steps({ printed, afterDrift, width, guarded, rounded, to }, options, {
			drift: allowanceText(drift, { unit, unitScale }),
			guardBand
		})
	};
}

/** U in the unit of the table. */
function amountOf(uncertainty: Allowance, value: number, unitScale: number): number {
	return 'relative' in uncertainty
		? Math.abs(value) * uncertainty.relative
		: uncertainty.absolute / unitScale;
}

/** A test sheet carries one decimal or figure more than the datasheet. */
function finer(resolution: Resolution): Resolution {
	return 'step' in resolution
		? { step: Number((resolution.step / 10).toPrecision(12)) }
		: { significantFigures: resolution.significantFigures + 1 };
}

interface TestChain {
	readonly printed: number;
	readonly afterDrift: number;
	readonly width: number;
	readonly guarded: number;
	readonly rounded: Rounded;
	readonly to: Resolution;
}

function steps(
	{ printed, afterDrift, width, guarded, rounded, to }: TestChain,
	{ unit, side }: TestLimitOptions,
	{ drift, guardBand }: { readonly drift: string; readonly guardBand: number }
): DerivationStep[] {
	const line = (name: string, method: string, value: number, text = significant(value, 6)) => ({
		name,
		method,
		value,
		unit,
		text
	});
	return [
		line(`Printed ${side}`, 'What the device must keep over life.', printed),
		line('Drift over life', `${drift} inwards.`, afterDrift),
		line(
			'Guard band',
			`${guardBand} × U = ${significant(width, 4)}\u00a0${unit} inwards, JCGM 106.`,
			guarded
		),
		line(
			'Round inwards',
			`${resolutionText(to, unit)}, in decimal arithmetic.`,
			rounded.value,
			rounded.text
		)
	];
}
