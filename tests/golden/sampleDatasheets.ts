import type {
	CapacitanceRow,
	CharacteristicRow,
	DatasheetDocument,
	DatasheetStatus,
	PrintedNumber,
	RatingRow,
	RichText,
	SlotState
} from '../../src/lib/core/datasheet/document';
import type { PublicationRecord } from '../../src/lib/core/datasheet/record';
import { symbolRuns } from '../../src/lib/core/datasheet/symbolRuns';
import type { Basis } from '../../src/lib/core/limits/basis';

/** Numbers of an invented part, as a layout needs them; not an oracle for anything. */
const printed = (text: string | null, scale = 1): PrintedNumber | null =>
	text === null ? null : { text, value: Number(text.replace('\u2212', '-')) * scale };

const number = (text: string): PrintedNumber => ({
	text,
	value: Number(text.replace('\u2212', '-'))
});

const row = (id: string, state: SlotState = 'bound') => ({
	id,
	slot: id,
	state,
	trace: state === 'unbound' ? null : 'a'.repeat(64)
});

const plain = (text: string): RichText => symbolRuns(text);

const CV: readonly (readonly [string, string, string, string, Basis])[] = [
	['0.5', '27.6', '30.4', '33.5', 'characterized'],
	['1', '23.5', '25.0', '26.6', 'tested'],
	['2', '17.1', '18.3', '19.6', 'correlation'],
	['3', '13.3', '14.4', '15.5', 'correlation'],
	['4', '10.9', '11.8', '12.7', 'correlation'],
	['6', '7.92', '8.59', '9.31', 'correlation'],
	['8', '6.19', '6.73', '7.32', 'correlation'],
	['10', '5.06', '5.52', '6.01', 'correlation'],
	['12', '4.28', '4.66', '5.08', 'correlation'],
	['15', '3.47', '3.78', '4.11', 'correlation'],
	['18', '2.92', '3.17', '3.44', 'correlation'],
	['20', '2.64', '2.86', '3.10', 'correlation'],
	['22', '2.41', '2.60', '2.82', 'correlation'],
	['25', '2.13', '2.29', '2.47', 'correlation'],
	['28', '1.91', '2.05', '2.21', 'tested']
];

const signed = (percent: number) =>
	`${percent < 0 ? '\u2212' : '+'}${Math.abs(percent).toFixed(1)}`;

/** A table row; deviation and ratio follow from its own printed digits. */
export function capacitanceRow(
	[bias, minimum, typical, maximum, basis]: (typeof CV)[number],
	reference: number
): CapacitanceRow {
	const middle = Number(typical);
	return {
		...row(`capacitance-table.25C.VR=${bias}`),
		slot: 'capacitance-table',
		bias: number(bias),
		minimum: printed(minimum, 1e-12),
		typical: printed(typical, 1e-12),
		maximum: printed(maximum, 1e-12),
		deviationMinimum: number(signed((Number(minimum) / middle - 1) * 100)),
		deviationMaximum: number(signed((Number(maximum) / middle - 1) * 100)),
		ratio: number((middle / reference).toPrecision(3)),
		basis
	};
}

const rating = (
	symbol: RatingRow['symbol'],
	name: string,
	conditions: string,
	[minimum, maximum, unit]: readonly [string | null, string | null, string]
): RatingRow => ({
	...row(`ratings.${name.replaceAll(' ', '-')}`),
	symbol,
	name,
	conditions: plain(conditions),
	minimum: printed(minimum),
	maximum: printed(maximum),
	unit,
	by: 'Ida Sandvik',
	reason: 'design rule'
});

const characteristic = (
	symbol: CharacteristicRow['symbol'],
	name: string,
	at: { readonly celsius: number; readonly conditions: string },
	[minimum, typical, maximum, unit, basis]: readonly [
		string | null,
		string | null,
		string | null,
		string,
		Basis | null
	],
	state: SlotState = 'bound'
): CharacteristicRow => ({
	...row(`characteristics.${name}.${at.celsius}.${at.conditions}`, state),
	symbol,
	name,
	conditions: plain(at.conditions),
	temperatureCelsius: at.celsius,
	minimum: printed(minimum),
	typical: printed(typical),
	maximum: printed(maximum),
	unit,
	basis
});

const tot = { quantity: 'C', subscript: 'tot' };

/** A tuning diode with everything a sheet of this format can print. */
export function tuningDiode(
	options: {
		readonly status?: DatasheetStatus;
		readonly partNumber?: string;
		readonly rows?: readonly (typeof CV)[number][];
		readonly paper?: 'a4' | 'letter';
		/** Slot states as an unfinished draft has them. */
		readonly isUnfinished?: boolean;
	} = {}
): DatasheetDocument {
	const rows = (options.rows ?? CV).map((each) => capacitanceRow(each, 2.05));
	const state = (unfinished: SlotState): SlotState => (options.isUnfinished ? unfinished : 'bound');
	const at25 = (conditions: string) => ({ celsius: 25, conditions });
	return {
		format: 'platen-datasheet-1',
		partNumber: options.partNumber ?? 'LKT-1130',
		productClass: 'tuning',
		className: 'Tuning diode',
		package: 'LS2',
		description:
			'Hyperabrupt silicon variable-capacitance diode, 25\u00a0pF to 2\u00a0pF, 30\u00a0V, in a surface-mount package with two leads',
		status: options.status ?? 'production',
		organization: {
			name: 'Larkmoor Semiconductor',
			paper: options.paper ?? 'a4',
			language: 'en'
		},
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
						{
							kind: 'text',
							text: 'The LKT-1130 tunes a resonant circuit by its bias. Its total capacitance falls from typically '
						},
						{ kind: 'value', text: '25.0\u00a0pF', slot: 'headline.1' },
						{ kind: 'text', text: ' at 1\u00a0V to ' },
						{ kind: 'value', text: '2.05\u00a0pF', slot: 'headline.2' },
						{
							kind: 'text',
							text: ' at 28\u00a0V; both ends of that range are tested on every device, and the curve between them is guaranteed from those two tests. A series resistance of typically '
						},
						{ kind: 'value', text: '0.55\u00a0Ω', slot: 'headline.3' },
						{ kind: 'text', text: ' gives a quality factor near 490 at 4\u00a0V and 50\u00a0MHz.' }
					]
				]
			},
			{
				kind: 'headline-figures',
				figures: [
					{
						figure: '23.5 to 26.6',
						unit: 'pF',
						label: plain('C_tot at V_R\u00a0=\u00a01\u00a0V'),
						basis: 'tested',
						slot: 'figures.1'
					},
					{
						figure: '11.4',
						unit: 'min',
						label: plain('C_tot(1\u00a0V) / C_tot(28\u00a0V)'),
						basis: 'tested',
						slot: 'figures.2'
					},
					{
						figure: '0.55',
						unit: 'Ω typ',
						label: plain('r_s at V_R\u00a0=\u00a04\u00a0V, f = 470\u00a0MHz'),
						basis: 'typical',
						slot: 'characteristics.series resistance.25.V_R\u00a0=\u00a04\u00a0V, f = 470\u00a0MHz'
					},
					{
						figure: '30',
						unit: 'V max',
						label: plain('V_R, limiting value'),
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
					plain('Capacitance tested at 1\u00a0V and 28\u00a0V on every device'),
					plain('Limits at 15 biases from 0.5\u00a0V to 28\u00a0V, each with its basis'),
					[
						...plain('r_s at most '),
						{ kind: 'value', text: '0.70\u00a0Ω', slot: 'features.3' },
						...plain(' at 4\u00a0V')
					],
					plain('I_R at most 20\u00a0nA at 30\u00a0V and 25\u00a0°C')
				]
			},
			{
				kind: 'prose',
				block: 'applications',
				heading: 'Applications',
				style: 'list',
				paragraphs: [
					plain('Tracking filters of VHF and UHF receivers'),
					plain('Voltage-controlled oscillators, 50\u00a0MHz to 900\u00a0MHz'),
					plain('Phase-locked-loop frequency synthesizers'),
					plain('Electrically tuned small antennas')
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
					},
					{
						code: 'LKT-1130-R13',
						package: 'LS2',
						grade: 'standard',
						marking: 'K4',
						packing: 'reel 330 mm, tape 8 mm',
						quantity: 10000
					}
				]
			},
			{
				kind: 'ratings',
				heading: 'Limiting values',
				note: 'absolute maximum rating system of IEC 60134; each value applies singly',
				rows: [
					rating({ quantity: 'V', subscript: 'R' }, 'continuous reverse voltage', '', [
						null,
						'30',
						'V'
					]),
					rating(
						{ quantity: 'V', subscript: 'RRM' },
						'repetitive peak reverse voltage',
						'superimposed signal, f ≥ 10\u00a0kHz',
						[null, '32', 'V']
					),
					rating({ quantity: 'I', subscript: 'F' }, 'continuous forward current', '', [
						null,
						'20',
						'mA'
					]),
					rating(
						{ quantity: 'P', subscript: 'tot' },
						'total power dissipation',
						'T_a ≤ 25\u00a0°C; above, less 2.0\u00a0mW/K',
						[null, '250', 'mW']
					),
					rating({ quantity: 'T', subscript: 'j' }, 'virtual junction temperature', '', [
						'\u221255',
						'150',
						'°C'
					]),
					rating({ quantity: 'T', subscript: 'stg' }, 'storage temperature', '', [
						'\u221255',
						'150',
						'°C'
					]),
					rating(
						{ quantity: 'T', subscript: 'sld' },
						'soldering temperature at the leads',
						't ≤ 10\u00a0s, at most three times',
						[null, '260', '°C']
					)
				]
			},
			{
				kind: 'characteristics',
				heading: 'Characteristics',
				note: 'limits hold at the stated conditions only',
				rows: [
					characteristic(
						{ quantity: 'V', subscript: '(BR)' },
						'breakdown voltage',
						at25('I_R\u00a0=\u00a010\u00a0µA'),
						['34', '38', null, 'V', 'tested']
					),
					characteristic(
						{ quantity: 'I', subscript: 'R' },
						'reverse current',
						at25('V_R\u00a0=\u00a030\u00a0V'),
						[null, '0.3', '20', 'nA', 'tested']
					),
					characteristic(
						{ quantity: 'V', subscript: 'F' },
						'forward voltage',
						at25('I_F\u00a0=\u00a010\u00a0mA'),
						[null, '0.82', '0.95', 'V', 'sample-tested']
					),
					characteristic(
						tot,
						'total capacitance, f = 1\u00a0MHz',
						at25('V_R\u00a0=\u00a01\u00a0V'),
						['23.5', '25.0', '26.6', 'pF', 'tested']
					),
					characteristic(
						tot,
						'total capacitance, f = 1\u00a0MHz',
						at25('V_R\u00a0=\u00a04\u00a0V'),
						['10.9', '11.8', '12.7', 'pF', 'correlation']
					),
					characteristic(
						tot,
						'total capacitance, f = 1\u00a0MHz',
						at25('V_R\u00a0=\u00a028\u00a0V'),
						['1.91', '2.05', '2.21', 'pF', 'tested']
					),
					characteristic(
						{ quantity: 'r', subscript: 's' },
						'series resistance',
						at25('V_R\u00a0=\u00a04\u00a0V, f = 470\u00a0MHz'),
						[null, '0.55', '0.70', 'Ω', 'sample-tested'],
						state('stale')
					),
					characteristic(
						{ quantity: 'C', subscript: 'case' },
						'case capacitance',
						at25('f = 1\u00a0MHz'),
						options.isUnfinished
							? [null, null, null, 'pF', null]
							: [null, '0.10', null, 'pF', 'typical'],
						state('unbound')
					),
					characteristic(
						{ quantity: 'I', subscript: 'R' },
						'reverse current',
						{ celsius: 85, conditions: 'V_R\u00a0=\u00a030\u00a0V' },
						[null, '22', '200', 'nA', 'sample-tested']
					)
				]
			},
			{
				kind: 'capacitance-table',
				heading: 'Total capacitance against reverse voltage',
				slot: 'capacitance-table',
				conditions: plain(
					'f = 1\u00a0MHz, signal level ≤ 50\u00a0mV r.m.s., T_j\u00a0=\u00a025\u00a0°C'
				),
				temperatureCelsius: 25,
				frequency: 1e6,
				unit: 'pF',
				unitScale: 1e-12,
				ratioTo: 28,
				rows
			},
			{
				kind: 'capacitance-chart',
				heading: 'Capacitance chart',
				conditions: plain('f = 1\u00a0MHz, T_j\u00a0=\u00a025\u00a0°C'),
				caption: plain(
					'Total capacitance against reverse voltage: typical curve and guaranteed band, drawn through the printed limits of the table; below, the same limits as deviation from typical.'
				),
				unit: 'pF',
				points: rows.map(({ bias, minimum, typical, maximum, basis }) => ({
					bias: bias.value,
					minimum: minimum === null ? null : Number(minimum.text),
					typical: Number(typical?.text),
					maximum: maximum === null ? null : Number(maximum.text),
					basis
				}))
			},
			{ kind: 'revision-history', heading: 'Revision history' },
			{
				kind: 'notice',
				heading: 'Notice',
				paragraphs: [
					'Ratings and characteristics\nLimiting values are ratings in the sense of IEC 60134: what the device withstands, not what to design for. Beyond any one of them it may fail at once or age early. Only a minimum or maximum with a basis mark is guaranteed; typical values are not.',
					'Use\nWhether this device suits an equipment is for its designer to establish. Use where a failure can hurt someone needs our written agreement beforehand, conformity with the standards and codes that apply there, and the work of people licensed for it.',
					'This document\nThe library holds the current version; a copy may be older. The content hash is the start of the SHA-256 of its data.'
				]
			}
		],
		basisNotes: [
			{ basis: 'tested', mark: 'T', text: 'tested on every device at this bias' },
			{
				basis: 'sample-tested',
				mark: 'S',
				text: 'sample-tested: a sample of each lot, accepted with none outside'
			},
			{
				basis: 'correlation',
				mark: 'G',
				text: 'guaranteed by correlation: follows from the tests at 1 V and 28 V for at least 99 % of devices, with 95 % confidence'
			},
			{
				basis: 'characterized',
				mark: 'C',
				text: 'characterized on 600 devices of 5 independent lots: with 95 % confidence at least 99 % of devices of future lots lie above the minimum, and as many below the maximum; each limit on its own'
			}
		],
		footnotes: [
			'Statistical limits rest on the lots measured and do not replace production test.',
			'Typical values are medians and are not guaranteed. Minima are rounded down and maxima up.'
		]
	};
}

export const releaseRecord: PublicationRecord = {
	kind: 'release',
	version: { major: 2, minor: 0 },
	date: '2026-11-16',
	at: '2026-11-10T08:30:00.000Z',
	contentHash: '04e55729b06f'.padEnd(64, '0123456789abcdef'),
	previous: { version: { major: 1, minor: 2 }, date: '2026-01-12' },
	history: [
		{
			version: { major: 2, minor: 0 },
			date: '2026-11-16',
			changes:
				'P_tot at T_a ≤ 25\u00a0°C lowered to 250\u00a0mW; r_s at V_R\u00a0=\u00a04\u00a0V, maximum tightened from 0.80\u00a0Ω to 0.70\u00a0Ω; C_tot at V_R\u00a0=\u00a00.5\u00a0V tightened; ordering code LKT-1130-R13 added'
		},
		{
			version: { major: 1, minor: 2 },
			date: '2026-01-12',
			changes: 'applications reworded; signal level of the capacitance measurement stated'
		},
		{
			version: { major: 1, minor: 1 },
			date: '2025-09-01',
			changes: 'typical curves redrawn from 5 lots'
		},
		{
			version: { major: 1, minor: 0 },
			date: '2025-06-16',
			changes: 'replaces preliminary 0.3 of 2025-03-10'
		}
	],
	changedRows: [
		'ordering.LKT-1130-R13',
		'features.3',
		'ratings.total-power-dissipation',
		'characteristics.series resistance.25.V_R\u00a0=\u00a04\u00a0V, f = 470\u00a0MHz',
		'characteristics.reverse current.85.V_R\u00a0=\u00a030\u00a0V',
		'capacitance-table.25C.VR=0.5'
	]
};

export const draftRecord: PublicationRecord = {
	...releaseRecord,
	kind: 'draft',
	date: '2026-11-02',
	at: '2026-11-02T14:20:00.000Z',
	contentHash: '256ce4bb373d'.padEnd(64, '0123456789abcdef')
};

/** A table of so many rows at steps of 0.15 V: longer than any page. */
export function manyRows(count: number): (typeof CV)[number][] {
	return Array.from({ length: count }, (_, at) => {
		const bias = 0.5 + at * 0.15;
		const typical = 0.1 + 38.5 * (1 + bias / 2.1) ** -1.12;
		return [
			bias.toFixed(2),
			(Math.floor(typical * 920) / 1000).toFixed(3),
			typical.toFixed(3),
			(Math.ceil(typical * 1080) / 1000).toFixed(3),
			'characterized'
		];
	});
}
