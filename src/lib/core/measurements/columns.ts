import { z } from 'zod';
import { findUnit, UNITS } from '../units/unit';
import type { Unit, UnitKind } from '../units/unit';
import { READING_KINDS } from './readingUnits';

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
	'capacitance',
	'current',
	'characteristic',
	'value',
	'unit',
	'censored',
	'forwardCurrent',
	'reverseCurrent',
	'pulseDuration',
	'currentSlope'
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
	capacitance: 'capacitance',
	current: 'current',
	characteristic: 'characteristic',
	value: 'value',
	unit: 'unit of the value',
	censored: 'censor flag',
	forwardCurrent: 'forward current',
	reverseCurrent: 'reverse current',
	pulseDuration: 'pulse duration',
	currentSlope: 'rate of fall of the current'
} as const satisfies Record<ColumnMeaning, string>;

/** The kinds of unit a meaning can be in; names have none. */
const MEANING_KINDS: Partial<Record<ColumnMeaning, readonly UnitKind[]>> = {
	temperature: ['temperature'],
	frequency: ['frequency'],
	bias: ['voltage'],
	capacitance: ['capacitance'],
	current: ['current'],
	value: READING_KINDS,
	forwardCurrent: ['current'],
	reverseCurrent: ['current'],
	pulseDuration: ['time'],
	currentSlope: ['currentSlope']
};

/** The units a column of this meaning can be in; empty for names. */
export function unitsOfMeaning(meaning: ColumnMeaning): readonly Unit[] {
	return (MEANING_KINDS[meaning] ?? []).flatMap((kind): readonly Unit[] => UNITS[kind]);
}

/** The unit that is written this way, if a column of this meaning can be in it. */
export function findMeaningUnit(meaning: ColumnMeaning, text: string): Unit | undefined {
	for (const kind of MEANING_KINDS[meaning] ?? []) {
		const found = findUnit(kind, text);
		if (found !== undefined) return found;
	}
	return undefined;
}

/** What a file can hold: sweeps along the bias, or single readings. */
export const FILE_CONTENTS = ['capacitance', 'current', 'value'] as const;
export type FileContent = (typeof FILE_CONTENTS)[number];

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
			'reversebias',
			'vf',
			'forwardvoltage'
		]
	],
	[
		'capacitance',
		['capacitance', 'cap', 'c', 'ct', 'ctot', 'cj', 'cd', 'cp', 'cs', 'totalcapacitance']
	],
	['current', ['current', 'i', 'id', 'ileak', 'leakage', 'leakagecurrent', 'diodecurrent']],
	['characteristic', ['characteristic', 'parameter', 'param', 'symbol', 'quantity', 'test']],
	['value', ['value', 'reading', 'result', 'measured', 'measurement']],
	['unit', ['unit', 'units', 'uom']],
	['censored', ['censored', 'censor', 'censorflag', 'flag', 'qualifier']],
	['forwardCurrent', ['if', 'iforward', 'forwardcurrent']],
	['reverseCurrent', ['ir', 'irev', 'reversecurrent']],
	['pulseDuration', ['tp', 'tpulse', 'pulse', 'pulseduration', 'pulsewidth']],
	['currentSlope', ['didt', 'difdt', 'currentslope', 'rateoffall']]
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
		const found = meaning && unit !== undefined ? findMeaningUnit(meaning, unit) : undefined;
		if (meaning !== undefined && found !== undefined) return { meaning, unit: found };
	}
	return { meaning: meaningOf(header.replace(/[[({].*$/, '')) ?? 'ignore' };
}

/**
 * The columns of a header; a meaning is given once, to the column that names it first. I_F and I_R are
 * conditions of readings; in a file without any, the first of them is what was measured.
 */
export function recogniseColumns(headers: readonly string[]): RecognisedColumn[] {
	const columns = recogniseEach(headers);
	if (contentOf(columns) !== undefined) return columns;
	const measured = columns.findIndex(
		({ meaning }) => meaning === 'forwardCurrent' || meaning === 'reverseCurrent'
	);
	return columns.map((column, position) =>
		position === measured ? { ...column, meaning: 'current' } : column
	);
}

function recogniseEach(headers: readonly string[]): RecognisedColumn[] {
	const taken = new Set<ColumnMeaning>();
	return headers.map((header) => {
		const column = recogniseColumn(header);
		if (column.meaning === 'ignore') return column;
		if (taken.has(column.meaning)) return { meaning: 'ignore' };
		taken.add(column.meaning);
		return column;
	});
}

/** What a file holds, by the column of its numbers; `undefined` while no column says. */
export function contentOf(
	columns: readonly { readonly meaning: ColumnMeaning }[]
): FileContent | undefined {
	return FILE_CONTENTS.find((content) => columns.some(({ meaning }) => meaning === content));
}

function meaningOf(name: string): ColumnMeaning | undefined {
	const plain = bare(name);
	return NAMES.find(([, names]) => names.includes(plain))?.[0];
}
