import { canonicalBytes } from '../../src/lib/core/datasheet/canonicalBytes';
import {
	datasheetDocument,
	type CapacitanceRow,
	type CharacteristicRow,
	type DatasheetDocument,
	type RatingRow
} from '../../src/lib/core/datasheet/document';
import { publicationRecord, type PublicationRecord } from '../../src/lib/core/datasheet/record';
import { createHash } from 'node:crypto';

const MINUS = '−';

const printed = (text: string, scale = 1) => ({
	text,
	value: Number(text.replace(MINUS, '-')) * scale
});

const text = (words: string) => ({ kind: 'text' as const, text: words });
const symbol = (quantity: string, subscript?: string) => ({
	kind: 'symbol' as const,
	symbol: subscript === undefined ? { quantity } : { quantity, subscript }
});
const value = (digits: string, slot: string) => ({ kind: 'value' as const, text: digits, slot });

/** Bias, minimum, typical, maximum in pF, deviations in %, ratio to 28 V. Invented. */
const TABLE: readonly [string, string, string, string, string, string, string][] = [
	['0.5', '27.6', '30.4', '33.5', '−9.2', '+10.2', '14.8'],
	['1', '23.5', '25.0', '26.6', '−6.0', '+6.4', '12.2'],
	['2', '17.1', '18.3', '19.6', '−6.6', '+7.1', '8.93'],
	['4', '10.9', '11.8', '12.7', '−7.6', '+7.6', '5.76'],
	['8', '6.19', '6.73', '7.32', '−8.0', '+8.8', '3.28'],
	['15', '3.47', '3.78', '4.11', '−8.2', '+8.7', '1.84'],
	['28', '1.91', '2.05', '2.21', '−6.8', '+7.8', '1.00']
];

const TRACE = 'a3'.repeat(32);

const capacitanceRows: CapacitanceRow[] = TABLE.map(
	([bias, minimum, typical, maximum, below, above, ratio]) => ({
		id: `capacitance.25c.VR=${bias}`,
		slot: 'capacitance.25c',
		state: 'bound',
		trace: TRACE,
		bias: printed(bias),
		minimum: printed(minimum, 1e-12),
		typical: printed(typical, 1e-12),
		maximum: printed(maximum, 1e-12),
		deviationMinimum: printed(below),
		deviationMaximum: printed(above),
		ratio: printed(ratio),
		basis: bias === '1' || bias === '28' ? 'tested' : 'characterized'
	})
);

const ratingRows: RatingRow[] = [
	{
		id: 'ratings.reverse-voltage',
		slot: 'ratings.reverse-voltage',
		state: 'bound',
		trace: null,
		symbol: { quantity: 'V', subscript: 'R' },
		name: 'continuous reverse voltage',
		conditions: [],
		minimum: null,
		maximum: printed('30'),
		unit: 'V',
		by: 'Ida Sandvik',
		reason: 'design rule of the junction'
	},
	{
		id: 'ratings.power',
		slot: 'ratings.power',
		state: 'bound',
		trace: null,
		symbol: { quantity: 'P', subscript: 'tot' },
		name: 'total power dissipation',
		conditions: [symbol('T', 'a'), text(' ≤ 25 °C')],
		minimum: null,
		maximum: printed('250', 1e-3),
		unit: 'mW',
		by: 'Ida Sandvik',
		reason: 'package family'
	},
	{
		id: 'ratings.storage-temperature',
		slot: 'ratings.storage-temperature',
		state: 'bound',
		trace: null,
		symbol: { quantity: 'T', subscript: 'stg' },
		name: 'storage temperature',
		conditions: [],
		minimum: printed('−55'),
		maximum: printed('150'),
		unit: '°C',
		by: 'Ida Sandvik',
		reason: 'package family'
	}
];

const characteristicRows: CharacteristicRow[] = [
	{
		id: 'characteristics.capacitance-4v',
		slot: 'characteristics.capacitance-4v',
		state: 'bound',
		trace: TRACE,
		symbol: { quantity: 'C', subscript: 'tot' },
		name: 'total capacitance',
		conditions: [symbol('V', 'R'), text(' = 4 V, '), symbol('f'), text(' = 1 MHz')],
		temperatureCelsius: 25,
		minimum: printed('10.9', 1e-12),
		typical: printed('11.8', 1e-12),
		maximum: printed('12.7', 1e-12),
		unit: 'pF',
		basis: 'characterized'
	},
	{
		id: 'characteristics.capacitance-4v-85c',
		slot: 'characteristics.capacitance-4v-85c',
		state: 'bound',
		trace: TRACE,
		symbol: { quantity: 'C', subscript: 'tot' },
		name: 'total capacitance',
		conditions: [symbol('V', 'R'), text(' = 4 V, '), symbol('f'), text(' = 1 MHz')],
		temperatureCelsius: 85,
		minimum: null,
		typical: printed('12.0', 1e-12),
		maximum: null,
		unit: 'pF',
		basis: 'typical'
	}
];

/** A complete document with one section of each kind. What a test changes goes into `changes`. */
export function sampleDocument(changes: Partial<DatasheetDocument> = {}): DatasheetDocument {
	return datasheetDocument.parse({
		format: 'platen-datasheet-1',
		partNumber: 'LKT-1130',
		productClass: 'tuning',
		className: 'Tuning diode',
		package: 'LS2',
		description: 'Hyperabrupt silicon variable-capacitance diode',
		status: 'production',
		organization: { name: 'Larkmoor Semiconductor', paper: 'a4', language: 'en' },
		template: { key: 'tuning', number: 1 },
		sections: [
			{ kind: 'masthead' },
			{
				kind: 'prose',
				block: 'headline',
				heading: null,
				style: 'paragraph',
				paragraphs: [
					[
						text('Its total capacitance falls from typically '),
						value('25.0 pF', 'capacitance.25c.VR=1'),
						text(' at '),
						symbol('V', 'R'),
						text(' = 1 V to '),
						value('2.05 pF', 'capacitance.25c.VR=28'),
						text(' at '),
						symbol('V', 'R'),
						text(' = 28 V.')
					]
				]
			},
			{
				kind: 'headline-figures',
				figures: [
					{
						figure: '23.5 to 26.6',
						unit: 'pF',
						label: [symbol('C', 'tot'), text(' at '), symbol('V', 'R'), text(' = 1 V')],
						basis: 'tested',
						slot: 'capacitance.25c.VR=1'
					},
					{
						figure: '30',
						unit: 'V max',
						label: [symbol('V', 'R'), text(', limiting value')],
						basis: null,
						slot: 'ratings.reverse-voltage'
					}
				]
			},
			{
				kind: 'prose',
				block: 'features',
				heading: 'Features',
				style: 'list',
				paragraphs: [
					[text('Limits at seven biases, each with its basis')],
					[text('Capacitance at 4 V at most '), value('12.7 pF', 'capacitance.25c.VR=4')]
				]
			},
			{
				kind: 'ordering',
				heading: 'Ordering',
				rows: [
					{
						code: 'LKT-1130-R7',
						package: 'LS2',
						grade: 'standard',
						marking: 'K4',
						packing: 'reel 180 mm, tape 8 mm',
						quantity: 3000
					}
				]
			},
			{
				kind: 'ratings',
				heading: 'Limiting values',
				note: 'absolute maximum rating system of IEC 60134; each value applies singly',
				rows: ratingRows
			},
			{
				kind: 'characteristics',
				heading: 'Characteristics',
				note: 'limits hold at the stated conditions only',
				rows: characteristicRows
			},
			{
				kind: 'capacitance-table',
				heading: 'Total capacitance against reverse voltage',
				slot: 'capacitance.25c',
				conditions: [symbol('f'), text(' = 1 MHz, '), symbol('T', 'j'), text(' = 25 °C')],
				temperatureCelsius: 25,
				frequency: 1e6,
				unit: 'pF',
				unitScale: 1e-12,
				ratioTo: 28,
				rows: capacitanceRows
			},
			{
				kind: 'capacitance-chart',
				heading: 'Capacitance curve',
				conditions: [symbol('f'), text(' = 1 MHz, '), symbol('T', 'j'), text(' = 25 °C')],
				caption: [
					text('Total capacitance against reverse voltage: typical curve and guaranteed band')
				],
				unit: 'pF',
				points: TABLE.map(([bias, minimum, typical, maximum]) => ({
					bias: Number(bias),
					minimum: Number(minimum),
					typical: Number(typical),
					maximum: Number(maximum),
					basis: 'characterized'
				}))
			},
			{ kind: 'revision-history', heading: 'Revision history' },
			{
				kind: 'notice',
				heading: 'Notice',
				paragraphs: [
					'Ratings are limiting values in the sense of IEC 60134. Typical values are not guaranteed.'
				]
			}
		],
		basisNotes: [
			{ basis: 'tested', mark: 'T', text: 'tested on every device' },
			{
				basis: 'characterized',
				mark: 'C',
				text: 'characterized on 300 devices of 3 independent lots'
			},
			{ basis: 'typical', mark: 'typ', text: 'typical, not guaranteed' }
		],
		footnotes: [
			'Typical values are medians and are not guaranteed.',
			'Minima are rounded down and maxima up.'
		],
		...changes
	});
}

/** The record of a draft's proof of a document, with the document's real hash. */
export function sampleRecord(
	document: DatasheetDocument,
	changes: Partial<PublicationRecord> = {}
): PublicationRecord {
	return publicationRecord.parse({
		kind: 'draft',
		version: null,
		date: '2026-11-02',
		at: '2026-11-02T14:20:00.000Z',
		contentHash: createHash('sha256').update(canonicalBytes(document)).digest('hex'),
		previous: null,
		history: [],
		changedRows: [],
		...changes
	});
}
