import { BASIS_WORDS } from '$lib/core/limits/basis';
import type { LimitValue, TestYield } from '$lib/core/limits/limit';
import { SHORT, signedText, type GridRow, type Shown } from './gridRow';
import type { WithoutLotText } from './limitFacts';
import type { LimitNumbers, Spread } from './spreadFigure';

/** What the sheet of one printed number shows. */
export interface Derivation {
	readonly shown: Shown;
	readonly row: GridRow;
	/** `null` where nothing is printed: the row's refusals say why. */
	readonly value: LimitValue | null;
	readonly unit: string;
	readonly conditionText: string;
	readonly policyText: string;
	readonly trace: string;
	readonly engineVersion: string;
	readonly limits: LimitNumbers;
	/** `null` where nothing was measured. */
	readonly spread: Spread | null;
	/** What the devices say about the limits; empty where there are none. */
	readonly facts: readonly { readonly term: string; readonly text: string }[];
	/** The limits without each lot in turn; empty with fewer than two lots. */
	readonly withoutLots: readonly WithoutLotText[];
	readonly testYield: TestYield | null;
}

/** The sheet as plain text, one step a line, for a mail or a report. */
export function derivationText(of: Derivation): string {
	const head = `C_tot ${SHORT[of.shown]} at V_R = ${signedText(of.row.bias)} V, ${of.conditionText}`;
	const steps = of.value?.derivation.map(
		({ name, method, text, unit }, index) =>
			`${index + 1}. ${name}: ${[text, unit].filter(Boolean).join(' ')} (${method})`
	);
	return [
		head,
		...(steps ?? []),
		...(of.value === null ? [] : [`Printed ${of.shown}: ${of.value.text} ${of.unit}`]),
		...(of.value?.test === undefined ? [] : [`Test limit: ${of.value.test.text} ${of.unit}`]),
		...of.row.refusals,
		...of.row.warnings,
		...of.facts.map(({ term, text }) => `${term}: ${text}`),
		`Basis: ${BASIS_WORDS[of.row.basis]}. Policy: ${of.policyText}`,
		`Trace ${of.trace}, engine ${of.engineVersion}`
	].join('\n');
}
