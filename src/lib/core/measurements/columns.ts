import { z } from 'zod';
import { findUnit } from '../units/unit';
import type { Unit, UnitKind } from '../units/unit';

/** What a column of a file can mean. */
export const COLUMN_MEANINGS = [
	'ignore',
	'lot',
	'waferLot',
	'wafer',
	'site',
	'element',
	'device',
	'temperature',
	'frequency',
	'bias',
	'capacitance'
] as const;
export const columnMeaning = z.enum(COLUMN_MEANINGS);
export type ColumnMeaning = z.infer<typeof columnMeaning>;

/** How each meaning is written for people. */
export const MEANING_NAMES = {
	ignore: 'not used',
	lot: 'lot',
	waferLot: 'wafer lot',
	wafer: 'wafer',
	site: 'site',
	element: 'element',
	device: 'device',
	temperature: 'temperature',
	frequency: 'frequency',
	bias: 'bias voltage',
	capacitance: 'capacitance'
} as const satisfies Record<ColumnMeaning, string>;

/** The kind of unit a meaning needs; names have none. */
export const MEANING_UNITS: Partial<Record<ColumnMeaning, UnitKind>> = {
	temperature: 'temperature',
	frequency: 'frequency',
	bias: 'voltage',
	capacitance: 'capacitance'
};

/** Names that files give their columns: small letters and digits only. */
const NAMES: readonly (readonly [ColumnMeaning, readonly string[]])[] = [
	['lot', ['lot', 'lotid', 'lotno', 'lotnumber', 'lotname', 'batch']],
	['waferLot', ['waferlot', 'waferlotid', 'motherlot', 'diffusionlot']],
	['wafer', ['wafer', 'waferid', 'waferno', 'wafernumber', 'wfr', 'slot']],
	['site', ['site', 'siteid', 'position', 'pos', 'xy', 'coordinate', 'diexy']],
	['element', ['element', 'elementid', 'diode', 'section']],
	[
		'device',
		['device', 'deviceid', 'deviceno', 'devicename', 'dut', 'sample', 'serial', 'sn', 'part']
	],
	[
		'temperature',
		[
			'temperature',
			'temp',
			't',
			'tj',
			'ta',
			'tc',
			'tchuck',
			'chucktemperature',
			'junctiontemperature'
		]
	],
	['frequency', ['frequency', 'freq', 'f', 'testfrequency']],
	[
		'bias',
		[
			'bias',
			'biasvoltage',
			'voltage',
			'v',
			'vr',
			'vrev',
			'vbias',
			'vdc',
			'reversevoltage',
			'reversebias'
		]
	],
	[
		'capacitance',
		['capacitance', 'cap', 'c', 'ct', 'ctot', 'cj', 'cd', 'cp', 'cs', 'totalcapacitance']
	]
];

/** A column as its header reads; without a unit when the header names none. */
export interface RecognisedColumn {
	readonly meaning: ColumnMeaning;
	readonly unit?: Unit;
}

const bare = (text: string) => text.toLowerCase().replace(/[^a-z0-9]/g, '');

/** Name and unit in `C [pF]`, `Bias (V)`, `V_R/V`, `capacitance_pF`, `T, °C` and `Cap pF`. */
const SHAPES = [
	/^(?<name>.*?)\s*[[({]\s*(?<unit>[^\])}]*?)\s*[\])}]\s*$/,
	/^(?<name>.*)\s*[/,]\s*(?<unit>[^/,]+)$/,
	/^(?<name>.*)[_\s-](?<unit>[^_\s-]+)$/
];

/**
 * What a header says of its column. A unit is taken from the header or not at all; a name that is
 * not known gives *not used*.
 *
 * @example recogniseColumn('capacitance_pF') // { meaning: 'capacitance', unit: pF }
 */
export function recogniseColumn(header: string): RecognisedColumn {
	for (const shape of SHAPES) {
		const { name, unit } = shape.exec(header.trim())?.groups ?? {};
		const meaning = name === undefined ? undefined : meaningOf(name);
		const kind = meaning && MEANING_UNITS[meaning];
		const found = kind && unit !== undefined ? findUnit(kind, unit) : undefined;
		if (meaning !== undefined && found !== undefined) return { meaning, unit: found };
	}
	return { meaning: meaningOf(header.replace(/[[({].*$/, '')) ?? 'ignore' };
}

/** The columns of a header; a meaning is given once, to the column that names it first. */
export function recogniseColumns(headers: readonly string[]): RecognisedColumn[] {
	const taken = new Set<ColumnMeaning>();
	return headers.map((header) => {
		const column = recogniseColumn(header);
		if (column.meaning === 'ignore') return column;
		if (taken.has(column.meaning)) return { meaning: 'ignore' };
		taken.add(column.meaning);
		return column;
	});
}

function meaningOf(name: string): ColumnMeaning | undefined {
	const plain = bare(name);
	return NAMES.find(([, names]) => names.includes(plain))?.[0];
}
