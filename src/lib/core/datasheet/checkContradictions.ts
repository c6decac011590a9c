import { draftMessages } from '../messages/datasheet';
import { inUnit, PARTS } from './boundTexts';
import { compareDecimals } from './decimalText';
import { isPrinted, type Place } from './place';
import { printNumber, withUnit } from './printNumber';
import type { DraftProblem } from './resolveInput';

/** Contradictions no datasheet may print, whatever its status. */
export function checkContradictions(places: readonly Place[]): DraftProblem[] {
	const printed = places.filter(isPrinted);
	return [
		...printed.flatMap(outOfOrder),
		...rising(printed),
		...beyondRating(printed),
		...power(printed),
		...differing(printed)
	];
}

const problem = ({ id, label }: Place, message: string): DraftProblem => ({
	place: id,
	label,
	message
});

/** Minimum ≤ typical ≤ maximum, compared as decimal numbers. */
function outOfOrder(place: Place): DraftProblem[] {
	const there = PARTS.flatMap((part) => {
		const text = place.prints?.[part] ?? null;
		return text === null ? [] : [{ part, text }];
	});
	return there.slice(1).flatMap((upper, index) => {
		const lower = there[index];
		return lower !== undefined && compareDecimals(lower.text, upper.text) > 0
			? [problem(place, draftMessages.outOfOrder(lower.part, upper.part))]
			: [];
	});
}

/** A depletion layer only widens: no column of a table rises with the reverse bias. */
function rising(places: readonly Place[]): DraftProblem[] {
	const inTables = places.filter(({ bias }) => bias !== null);
	const tables = [...new Set(inTables.map(({ slot }) => slot))];
	return tables.flatMap((table) =>
		PARTS.flatMap((part) => {
			const column = inTables.filter(
				({ slot, prints }) => slot === table && prints?.[part] !== null
			);
			return column.slice(1).flatMap((row, index) => {
				const before = column[index];
				return before !== undefined && valueOf(row, part) > valueOf(before, part)
					? [problem(row, draftMessages.rises(part, String(row.bias), String(before.bias)))]
					: [];
			});
		})
	);
}

/** No C(V) row above the V_R rating, and no V_R rating above the smallest V_(BR). */
function beyondRating(places: readonly Place[]): DraftProblem[] {
	const rating = reverseVoltageRating(places);
	const limit = rating?.prints?.maximum ?? null;
	if (rating === undefined || limit === null) return [];
	const volts = valueOf(rating, 'maximum');
	const breakdown = places
		.filter(({ name, prints }) => name === 'V_(BR)' && prints?.minimum !== null)
		.filter((place) => valueOf(place, 'minimum') < volts);
	return [
		...places
			.filter(({ kind, reverseVoltage }) => kind === 'limit' && (reverseVoltage ?? 0) > volts)
			.map((place) =>
				problem(place, draftMessages.beyondRating(String(place.reverseVoltage), limit))
			),
		...breakdown.map((place) =>
			problem(rating, draftMessages.ratingAboveBreakdown(limit, place.prints?.minimum ?? ''))
		)
	];
}

function reverseVoltageRating(places: readonly Place[]): Place | undefined {
	const named = (name: string) =>
		places.find((place) => place.kind === 'rating' && place.name === name);
	return named('V_R') ?? named('V_RRM');
}

/** P_tot at an ambient of 25 °C can't be more than (T_j − 25 °C) / R_th(j-a). */
function power(places: readonly Place[]): DraftProblem[] {
	const find = (name: string) => places.find((place) => place.name === name);
	const [total, junction, resistance] = [find('P_tot'), find('T_j'), find('R_th(j-a)')];
	if (!total?.conditions.includes('25') || !junction || !resistance) return [];
	const kelvins = valueOf(junction, 'maximum') - 25;
	const watts = kelvins / valueOf(resistance, 'maximum');
	// Rounded ratings may meet: a thousandth is no contradiction.
	if (!(valueOf(total, 'maximum') > watts * 1.001)) return [];
	const text = withUnit(total.prints?.maximum ?? '', total.unit);
	const possible = withUnit(String(Number((watts * 1e3).toPrecision(3))), 'mW');
	return [problem(total, draftMessages.powerContradicts(text, possible))];
}

/** The same quantity at the same condition prints the same wherever it stands. */
function differing(places: readonly Place[]): DraftProblem[] {
	return places
		.filter(({ kind }) => kind === 'limit')
		.flatMap((place, index, all) => {
			const twin = all.slice(0, index).find((other) => isTwin(place, other));
			return twin !== undefined && !isSame(place, twin)
				? [problem(place, draftMessages.differsFrom(twin.label))]
				: [];
		});
}

function isTwin(a: Place, b: Place): boolean {
	return (
		a.name === b.name &&
		a.conditions === b.conditions &&
		a.temperatureCelsius === b.temperatureCelsius
	);
}

/** Parts that only one of the two prints don't contradict each other. */
function isSame(a: Place, b: Place): boolean {
	if (a.prints === null || b.prints === null) return true;
	const { prints } = a;
	const other = inUnit({ ...b.prints, unitScale: b.unitScale }, prints.unit, a.unitScale);
	return PARTS.every(
		(part) =>
			prints[part] === null ||
			other[part] === null ||
			compareDecimals(prints[part], other[part]) === 0
	);
}

/** The printed number in SI; NaN, which is above and below nothing, where there is none. */
function valueOf({ prints, unitScale }: Place, part: (typeof PARTS)[number]): number {
	const text = prints?.[part] ?? null;
	return text === null ? Number.NaN : printNumber(text, unitScale).value;
}
