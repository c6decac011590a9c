import { readFileSync } from 'node:fs';
import type { Binding, BoundTexts, LimitBinding } from '../../src/lib/core/datasheet/binding';
import type { ResolveInput } from '../../src/lib/core/datasheet/resolveInput';
import type { LimitRow } from '../../src/lib/core/limits/limit';
import { readTemplate } from '../../src/lib/core/template/readTemplate';
import type { Template } from '../../src/lib/core/template/template';
import { limitRowOf, samplePolicy } from './limitRows';

export const AT = '2026-01-05T08:00:00.000Z';

export function projectTemplate(key: 'tuning' | 'rectifier'): Template {
	const file = `templates/${key}.json`;
	return readTemplate(readFileSync(file, 'utf8'), file);
}

/** What a row prints, as a binding keeps it. */
export function textsOf(row: LimitRow, changes: Partial<BoundTexts> = {}): BoundTexts {
	return {
		inputHash: row.inputHash,
		unit: row.unit,
		unitScale: row.unitScale,
		minimum: row.minimum?.text ?? null,
		typical: row.typical?.text ?? null,
		maximum: row.maximum?.text ?? null,
		sampleSize: row.sampleSize,
		independentLots: row.independentLots,
		...changes
	};
}

export function boundTo(row: LimitRow, changes: Partial<LimitBinding> = {}): LimitBinding {
	return {
		kind: 'limit',
		policyVersion: 1,
		basis: 'characterized',
		basisReason: null,
		printed: textsOf(row),
		kept: null,
		at: AT,
		...changes
	};
}

export const rating = (minimum: string | null, maximum: string | null): Binding => ({
	kind: 'rating',
	minimum,
	maximum,
	reason: 'package family',
	by: 'Ida Sandvik',
	at: AT
});

export const struckOut = (reason = 'not measured'): Extract<Binding, { kind: 'struck-out' }> => ({
	kind: 'struck-out',
	reason,
	by: 'Ida Sandvik',
	at: AT
});

/** Bias, minimum, typical, maximum in pF of an invented hyperabrupt diode. */
export const TUNING_ROWS = (
	[
		[0.5, '27.6', '30.4', '33.5'],
		[1, '23.5', '25.0', '26.6'],
		[2, '17.1', '18.3', '19.6'],
		[3, '13.3', '14.4', '15.5'],
		[4, '10.9', '11.8', '12.7'],
		[6, '7.92', '8.59', '9.31'],
		[8, '6.19', '6.73', '7.32'],
		[10, '5.06', '5.52', '6.01'],
		[12, '4.28', '4.66', '5.08'],
		[15, '3.47', '3.78', '4.11'],
		[18, '2.92', '3.17', '3.44'],
		[20, '2.64', '2.86', '3.10'],
		[22, '2.41', '2.60', '2.82'],
		[25, '2.13', '2.29', '2.47'],
		[28, '1.91', '2.05', '2.21']
	] as const
).map(([bias, ...texts]) => limitRowOf({ bias, texts }));

/** The tuning diode's row at a bias. */
export function tuningRow(bias: number): LimitRow {
	const row = TUNING_ROWS.find(({ condition }) => condition.reverseVoltage === bias);
	if (row === undefined) throw new Error(`no row at ${bias} V`);
	return row;
}

/** A production draft of the tuning diode that nothing is missing from. */
export function completeDraft(changes: Partial<ResolveInput> = {}): ResolveInput {
	const limits = new Map<string, LimitRow[]>([
		['capacitance.25c', TUNING_ROWS],
		['characteristics.capacitance-1v', [tuningRow(1)]],
		['characteristics.capacitance-28v', [tuningRow(28)]]
	]);
	const bindings = new Map<string, Binding>([
		['ratings.reverse-voltage', rating(null, '30')],
		['ratings.junction-temperature', rating('−55', '150')],
		['ratings.power', rating(null, '250')],
		['characteristics.reverse-current', struckOut()],
		['characteristics.capacitance-ratio', struckOut()],
		['characteristics.series-resistance', struckOut()],
		['characteristics.capacitance-1v', boundTo(tuningRow(1))],
		['characteristics.capacitance-28v', boundTo(tuningRow(28))],
		[
			'capacitance.25c',
			{
				kind: 'table',
				rows: TUNING_ROWS.map((row) => ({
					bias: row.condition.reverseVoltage ?? 0,
					binding: boundTo(row)
				}))
			}
		]
	]);
	return {
		template: projectTemplate('tuning'),
		templateNumber: 1,
		status: 'production',
		product: {
			partNumber: 'LKT-1130',
			productClass: 'tuning',
			package: 'LS2',
			description: 'Hyperabrupt silicon diode'
		},
		orderingCodes: [
			{
				code: 'LKT-1130-R7',
				grade: 'standard',
				marking: 'K4',
				packing: 'reel 180 mm',
				quantity: 3000
			}
		],
		organization: {
			name: 'Larkmoor Semiconductor',
			paper: 'a4',
			language: 'en',
			notice: ['Typical values are not guaranteed.']
		},
		bindings,
		texts: new Map([
			[
				'headline',
				'Falls from {C_tot @ V_R=1 V : typ} to {C_tot @ V_R=28 V : typ} below V_R = 30 V.'
			],
			['features', 'At most {C_tot @ V_R=4 V : max} at 4 V\nRated {V_R : max}']
		]),
		limits,
		policies: new Map([[1, samplePolicy()]]),
		...changes
	};
}

/** The same with some bindings changed, or taken away by `null`. */
export function withBindings(
	input: ResolveInput,
	changes: Readonly<Record<string, Binding | null>>
): ResolveInput {
	const bindings = new Map(input.bindings);
	for (const [slot, binding] of Object.entries(changes)) {
		if (binding === null) bindings.delete(slot);
		else bindings.set(slot, binding);
	}
	return { ...input, bindings };
}

/** The same with one row of the table bound otherwise, or unbound by `null`. */
export function withTableRow(
	input: ResolveInput,
	bias: number,
	binding: LimitBinding | ReturnType<typeof struckOut> | null
): ResolveInput {
	const table = input.bindings.get('capacitance.25c');
	const rows = table?.kind === 'table' ? table.rows.filter((row) => row.bias !== bias) : [];
	return withBindings(input, {
		'capacitance.25c': {
			kind: 'table',
			rows: binding === null ? rows : [...rows, { bias, binding }]
		}
	});
}

/** The same with what the measurements say at one bias of the table replaced; `null` takes it away. */
export function withMeasured(
	input: ResolveInput,
	bias: number,
	row: LimitRow | null
): ResolveInput {
	const rows = (input.limits.get('capacitance.25c') ?? []).filter(
		({ condition }) => condition.reverseVoltage !== bias
	);
	const limits = new Map(input.limits);
	limits.set('capacitance.25c', row === null ? rows : [...rows, row]);
	return { ...input, limits };
}
