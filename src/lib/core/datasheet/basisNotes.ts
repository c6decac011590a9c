import { BASES, BASIS_MARKS, type Basis } from '../limits/basis';
import { DEFAULT_K } from '../limits/methods/sigma';
import type { LimitPolicy } from '../limits/policy';
import { sheetTexts } from '../messages/datasheet';
import type { DatasheetDocument } from './document';
import { isPrinted, type Place } from './place';
import { withUnit } from './printNumber';

type BasisNote = DatasheetDocument['basisNotes'][number];

/** What each basis mark that occurs means here: content, confidence, devices and lots behind it. */
export function basisNotes(places: readonly Place[]): BasisNote[] {
	const printed = places.filter((place) => place.kind === 'limit' && isPrinted(place));
	return BASES.flatMap((basis) => {
		const rows = printed.filter((place) => place.basis === basis);
		return rows.length === 0 ? [] : [{ basis, mark: BASIS_MARKS[basis], text: words(basis, rows) }];
	});
}

function words(basis: Basis, rows: readonly Place[]): string {
	switch (basis) {
		case 'tested':
			return sheetTexts.tested();
		case 'sample-tested':
			return sheetTexts.sampleTested();
		case 'correlation':
			return sheetTexts.correlation();
		case 'typical':
			return sheetTexts.typical();
		case 'characterized':
			return byPolicy(rows).map(characterizedWords).join('. ');
		default:
			return basis satisfies never;
	}
}

/** The rows of each policy version together, in the order they first occur. */
function byPolicy(rows: readonly Place[]): Place[][] {
	const groups = new Map<number, Place[]>();
	for (const row of rows) {
		const id = row.policy?.id ?? 0;
		groups.set(id, [...(groups.get(id) ?? []), row]);
	}
	return [...groups.values()];
}

function characterizedWords(rows: readonly Place[]): string {
	const devices = range(rows.map(({ sampleSize }) => sampleSize));
	const lots = range(rows.map(({ independentLots }) => independentLots));
	const on = sheetTexts.characterized(
		`${devices} ${devices === '1' ? 'device' : 'devices'}`,
		`${lots} independent ${lots === '1' ? 'lot' : 'lots'}`
	);
	const rules = rows[0]?.policy?.rules;
	return rules === undefined ? on : `${on}: ${promise(rules)}`;
}

function promise(rules: LimitPolicy): string {
	if (rules.method === 'sigma') return sheetTexts.houseRule(rules.k ?? DEFAULT_K);
	const [content, confidence] = [percent(rules.content), percent(rules.confidence)];
	const devices = rules.method === 'lots' ? sheetTexts.futureDevices() : sheetTexts.devices();
	const text =
		rules.tails === 'both'
			? sheetTexts.bothLimits(content, confidence, devices)
			: sheetTexts.eachLimit(content, confidence, devices);
	return rules.span === 'whole-curve' ? `${text}; ${sheetTexts.wholeCurve()}` : text;
}

/** `300`, or `292 to 300`. */
function range(counts: readonly number[]): string {
	const [lowest, highest] = [Math.min(...counts), Math.max(...counts)];
	return lowest === highest ? String(lowest) : `${lowest} to ${highest}`;
}

function percent(share: number): string {
	return withUnit(String(Number((share * 100).toPrecision(12))), '%');
}
