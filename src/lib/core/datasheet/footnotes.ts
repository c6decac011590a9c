import { sheetTexts } from '../messages/datasheet';
import type { DatasheetStatus, DocumentSection } from './document';
import { isPrinted, type Place } from './place';

/** The statements a reader needs below what is printed; none that speaks of what isn't there. */
export function footnotes(
	status: DatasheetStatus,
	places: readonly Place[],
	sections: readonly DocumentSection[]
): string[] {
	const printed = places.filter(isPrinted);
	const limits = printed.filter(({ kind }) => kind === 'limit');
	const promised = limits.filter(
		({ prints }) => prints?.minimum !== null || prints.maximum !== null
	);
	const tables = sections.filter((section) => section.kind === 'capacitance-table');
	const ratios = tables.flatMap(({ ratioTo, rows }) =>
		ratioTo !== null && rows.some(({ ratio }) => ratio !== null) ? [ratioTo] : []
	);
	const deviates = tables.some(({ rows }) =>
		rows.some((row) => row.deviationMinimum !== null || row.deviationMaximum !== null)
	);
	return [
		...(status === 'preliminary' ? [sheetTexts.preliminary()] : []),
		...(status === 'target' ? [sheetTexts.target()] : []),
		...(limits.some(({ prints }) => prints?.typical !== null) ? [sheetTexts.typicalValues()] : []),
		...(promised.length > 0 ? [sheetTexts.rounding()] : []),
		...(promised.some(({ basis }) => basis === 'characterized') ? [sheetTexts.statistical()] : []),
		...(deviates ? [sheetTexts.deviations()] : []),
		...[...new Set(ratios)].map((bias) => sheetTexts.ratio(String(bias)))
	];
}
