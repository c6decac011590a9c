import type {
	CharacteristicRow,
	DatasheetDocument,
	DocumentSection
} from '../../src/lib/core/datasheet/document';
import { resolveChart } from '../../src/lib/core/datasheet/resolveChart';
import { resolveModel } from '../../src/lib/core/datasheet/resolveModel';
import type { PublicationRecord } from '../../src/lib/core/datasheet/record';
import { symbolRuns } from '../../src/lib/core/datasheet/symbolRuns';
import { findPackage } from '../../src/lib/core/outline/packages';
import { releaseRecord, tuningDiode } from './sampleDatasheets';

/** Numbers of an invented part, as a layout needs them; not an oracle for anything. */

type Kind = DocumentSection['kind'];

const thermalRow = (
	subscript: string,
	name: string,
	conditions: string,
	[typical, maximum]: readonly [string, string | null]
): CharacteristicRow => ({
	id: `thermal.${subscript}`,
	slot: `thermal.${subscript}`,
	state: 'bound',
	trace: null,
	symbol: { quantity: 'R', subscript },
	name,
	conditions: symbolRuns(conditions),
	temperatureCelsius: 25,
	minimum: null,
	typical: { text: typical, value: Number(typical) },
	maximum: maximum === null ? null : { text: maximum, value: Number(maximum) },
	unit: 'K/W',
	basis: maximum === null ? 'typical' : 'characterized'
});

/** Reverse current that doubles every 10 K, from 1 nA at 25 °C and 30 V. */
const leakage = (at25: number) =>
	Array.from({ length: 26 }, (_, at): [number, number] => {
		const celsius = -25 + at * 6;
		return [celsius, Number((at25 * 2 ** ((celsius - 25) / 10)).toPrecision(4))];
	});

/** A tuning diode in the second format, with every kind of section and four charts. */
export function completeSheet(
	options: Parameters<typeof tuningDiode>[0] & { readonly packageName?: string } = {}
): DatasheetDocument {
	const plain = tuningDiode(options);
	const table = plain.sections.find((section) => section.kind === 'capacitance-table');
	if (table?.kind !== 'capacitance-table') throw new Error('the sample has no capacitance table');
	const known = findPackage(options.packageName ?? 'SOD-323');
	if (known === undefined) throw new Error('the sample names no package');

	const chart = (heading: string, caption: string, show: 'inverse-square' | 'charge' | 'energy') =>
		resolveChart(
			{
				kind: 'chart',
				heading,
				caption,
				width: 'half',
				source: { from: 'table', table: 'capacitance-table', show }
			},
			{},
			table
		);
	const added: Readonly<Partial<Record<Kind, (DocumentSection | null)[]>>> = {
		prose: [
			{
				kind: 'terminals',
				heading: 'Terminals and marking',
				graphic: 'tuning',
				terminals: [
					{ number: '1', name: 'cathode (K), banded end' },
					{ number: '2', name: 'anode (A)' }
				],
				hasBand: true,
				marking: 'K4'
			}
		],
		ratings: [
			{
				kind: 'thermal',
				heading: 'Thermal characteristics',
				rows: [
					thermalRow('th(j-a)', 'thermal resistance, junction to ambient', 'FR4 1.6\u00a0mm', [
						'430',
						'500'
					]),
					thermalRow('th(j-sp)', 'thermal resistance, junction to solder point', 'cathode lead', [
						'180',
						null
					])
				]
			}
		],
		'capacitance-chart': [
			{
				kind: 'chart',
				heading: 'Reverse current',
				caption: symbolRuns('I_R against T_j, typical'),
				width: 'half',
				x: { symbol: { quantity: 'T', subscript: 'j' }, unit: '°C', scale: 'linear' },
				y: { symbol: { quantity: 'I', subscript: 'R' }, unit: 'nA', scale: 'log' },
				curves: [
					{ label: 'typical, V_R = 30\u00a0V', points: leakage(1), isMeasured: true },
					{ label: 'V_R = 10\u00a0V', points: leakage(0.4), isMeasured: false }
				],
				limits: [{ x: 85, y: 200, side: 'maximum', label: 'max 200\u00a0nA, S' }]
			},
			chart('Capacitive charge', 'Q_C against V_R, T_j = 25\u00a0°C', 'charge'),
			chart('Reciprocal square', '1/C² against V_R, T_j = 25\u00a0°C', 'inverse-square'),
			{
				kind: 'test-circuit',
				heading: 'Capacitance measurement',
				circuit: 'capacitance',
				caption: symbolRuns(
					'Bridge at f = 1\u00a0MHz; the choke keeps the signal from the bias source'
				)
			},
			{
				kind: 'outline',
				heading: 'Package outline and land pattern',
				package: known.name,
				shape: known.shape,
				dimensions: [...known.dimensions],
				land: [...known.land]
			},
			resolveModel(
				'SPICE model',
				{
					product: {
						partNumber: plain.partNumber,
						productClass: 'tuning',
						package: known.name,
						description: ''
					}
				},
				table,
				[]
			)
		]
	};
	const listsBefore = plain.sections.findLastIndex(
		(section) => section.kind === 'prose' && section.style === 'list'
	);
	const sections = plain.sections.flatMap((section, at) => [
		section,
		...(section.kind !== 'prose' || at === listsBefore ? (added[section.kind] ?? []) : [])
	]);
	return {
		...plain,
		format: 'platen-datasheet-2',
		package: known.name,
		sections: sections.filter((section) => section !== null)
	};
}

/** A release that lists its differences one by one. */
export const listedRecord: PublicationRecord = {
	...releaseRecord,
	history: releaseRecord.history.map((entry, at) =>
		at > 0
			? entry
			: {
					...entry,
					changes: 'Limits after two more lots; a second reel.',
					list: [
						{
							kind: 'rating',
							label: 'P_tot at T_a ≤ 25\u00a0°C, maximum',
							before: '300\u00a0mW',
							after: '250\u00a0mW'
						},
						{
							kind: 'tightened',
							label: 'r_s at V_R = 4\u00a0V, maximum',
							before: '0.80\u00a0Ω',
							after: '0.70\u00a0Ω'
						},
						{ kind: 'added', label: 'ordering code LKT-1130-R13', before: null, after: null }
					]
				}
	)
};
