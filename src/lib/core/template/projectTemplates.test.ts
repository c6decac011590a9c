import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { findCharacteristic } from '../characteristics/catalogue';
import { condition } from '../characteristics/condition';
import { symbolText } from '../characteristics/symbol';
import { readTemplate } from './readTemplate';
import { PRODUCT_CLASSES, type LimitSlot, type Template } from './template';

const templates = readdirSync('templates').map((file) =>
	readTemplate(readFileSync(`templates/${file}`, 'utf8'), file)
);

const limitSlots = ({ sections }: Template): LimitSlot[] =>
	sections.flatMap((section) =>
		section.kind === 'characteristics' || section.kind === 'thermal' ? section.slots : []
	);

/** Letter symbols of what may not stay open in production. */
const essentials = (template: Template) =>
	[
		...template.sections.flatMap((section) => (section.kind === 'ratings' ? section.slots : [])),
		...limitSlots(template)
	].flatMap(({ essential, symbol }) => (essential ? [symbolText(symbol)] : []));

it('there is one template a product class, in the second format', () => {
	expect(templates.map(({ productClass }) => productClass).toSorted()).toEqual(
		[...PRODUCT_CLASSES].toSorted()
	);
	for (const { format, key, productClass } of templates)
		expect([format, key]).toEqual(['platen-template-2', productClass]);
});

// The lists are from memory of IEC 60747-2, -3 and -4: no text of them was at hand.
it.each([
	['rectifier', ['V_RRM', 'I_F(AV)', 'I_FSM', 'T_j', 'T_stg', 'R_th(j-a)', 'V_F', 'I_R']],
	['tuning', ['V_R', 'T_j', 'I_R', 'C_tot', 'C_tot', 'C_ratio', 'r_s']],
	['detector-mixer', ['V_R', 'I_F', 'P_RF', 'T_j', 'T_stg', 'V_(BR)', 'V_F', 'C_tot', 'r_d']],
	[
		'switching',
		[
			'V_R',
			'V_RRM',
			'I_F',
			'I_FSM',
			'P_tot',
			'T_j',
			'T_stg',
			'R_th(j-a)',
			'V_F',
			'I_R',
			'I_R',
			'C_tot',
			't_rr'
		]
	],
	[
		'pin',
		['V_R', 'I_F', 'P_tot', 'T_j', 'T_stg', 'R_th(j-mb)', 'V_F', 'I_R', 'r_s', 'C_tot', 'τ_L']
	]
])('%s asks for what its standard asks for', (key, expected) => {
	const template = templates.find((each) => each.key === key);
	expect(template === undefined ? [] : essentials(template).toSorted()).toEqual(
		expected.toSorted()
	);
	expect(template?.sources).toContain('from memory');
});

it('between them they use every kind of section', () => {
	const kinds = new Set(templates.flatMap(({ sections }) => sections.map(({ kind }) => kind)));
	expect([...kinds].toSorted()).toEqual([
		'capacitance-chart',
		'capacitance-table',
		'characteristics',
		'chart',
		'headline-figures',
		'masthead',
		'model',
		'notice',
		'ordering',
		'outline',
		'prose',
		'ratings',
		'revision-history',
		'terminals',
		'test-circuit',
		'thermal'
	]);
});

describe.each(templates.map((template) => [template.key, template] as const))(
	'the slots of %s',
	(_, template) => {
		it('state of a known characteristic only what its readings are keyed by', () => {
			for (const slot of limitSlots(template)) {
				const known = findCharacteristic(slot.characteristic);
				if (known === undefined) continue;
				const stated = condition
					.keyof()
					.options.filter((part) => part !== 'temperatureCelsius' && slot[part] !== undefined);
				expect([...known.axes], `${slot.slot} of ${known.key}`).toEqual(
					expect.arrayContaining(stated)
				);
				expect(slot.symbol).toEqual(known.symbol);
				expect(slot.unit.endsWith(known.unit)).toBe(true);
			}
		});

		it('name characteristics of the catalogue, or one that no file gives yet', () => {
			const unknown = limitSlots(template)
				.filter(({ characteristic }) => findCharacteristic(characteristic) === undefined)
				.map(({ characteristic }) => characteristic);
			const without = new Set(['r_d', 'F', 'P_TSS', 'τ_L']);
			expect(unknown.filter((characteristic) => !without.has(characteristic))).toEqual([]);
		});
	}
);
