import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	AT,
	boundTo,
	completeDraft,
	projectTemplate,
	rating,
	struckOut,
	textsOf,
	tuningRow,
	TUNING_ROWS,
	withBindings,
	withMeasured,
	withTableRow
} from '../../../../tests/factories/draftParts';
import { limitRowOf, samplePolicy } from '../../../../tests/factories/limitRows';
import { draftMessages, sheetTexts } from '../messages/datasheet';
import { canonicalBytes } from './canonicalBytes';
import type { Binding } from './binding';
import { datasheetDocument, type DatasheetDocument } from './document';
import { plainText } from './plainText';
import { resolve } from './resolve';
import type { ResolveInput } from './resolveInput';

const sectionOf = <K extends DatasheetDocument['sections'][number]['kind']>(
	{ sections }: DatasheetDocument,
	kind: K
) => sections.filter((one): one is Extract<typeof one, { kind: K }> => one.kind === kind);

const messagesOf = (input: ResolveInput) =>
	resolve(input).problems.map(({ place, message }) => [place, message]);

describe('a complete production draft', () => {
	const { document, proof, problems, open } = resolve(completeDraft());

	it('may be submitted, and its document has the agreed shape', () => {
		expect(problems).toEqual([]);
		expect(datasheetDocument.parse(document)).toEqual(document);
		expect(datasheetDocument.parse(proof)).toEqual(proof);
	});

	it('prints a row of the table with digits kept, deviation and ratio', () => {
		const [table] = sectionOf(document, 'capacitance-table');
		expect(table?.rows[0]).toEqual({
			id: 'capacitance.25c.VR=0.5',
			slot: 'capacitance.25c',
			state: 'bound',
			trace: tuningRow(0.5).inputHash,
			bias: { text: '0.5', value: 0.5 },
			minimum: { text: '27.6', value: 27.6e-12 },
			typical: { text: '30.4', value: 30.4e-12 },
			maximum: { text: '33.5', value: 33.5e-12 },
			deviationMinimum: { text: '−9.2', value: -9.2 },
			deviationMaximum: { text: '+10.2', value: 10.2 },
			ratio: { text: '14.8', value: 14.8 },
			basis: 'characterized'
		});
		expect(table?.unit).toBe('pF');
		expect(table?.rows).toHaveLength(15);
	});

	it('draws the chart through the printed numbers', () => {
		const [chart] = sectionOf(document, 'capacitance-chart');
		expect(chart?.points).toHaveLength(15);
		expect(chart?.points[4]).toEqual({
			bias: 4,
			minimum: 10.9,
			typical: 11.8,
			maximum: 12.7,
			basis: 'characterized'
		});
	});

	it('fills inline bindings and sets symbols', () => {
		const [headline, features] = sectionOf(document, 'prose');
		expect(headline?.paragraphs).toEqual([
			[
				{ kind: 'text', text: 'Falls from ' },
				{ kind: 'value', text: '25.0\u00a0pF', slot: 'characteristics.capacitance-1v' },
				{ kind: 'text', text: ' to ' },
				{ kind: 'value', text: '2.05\u00a0pF', slot: 'characteristics.capacitance-28v' },
				{ kind: 'text', text: ' below ' },
				{ kind: 'symbol', symbol: { quantity: 'V', subscript: 'R' } },
				{ kind: 'text', text: ' = 30 V.' }
			]
		]);
		expect(features?.paragraphs.map(plainText)).toEqual([
			'At most 12.7\u00a0pF at 4 V',
			'Rated 30\u00a0V'
		]);
	});

	it('states the headline figures, each from where it is printed', () => {
		const [headline] = sectionOf(document, 'headline-figures');
		expect(headline?.figures.map(({ figure, unit, slot }) => [figure, unit, slot])).toEqual([
			['23.5 to 26.6', 'pF', 'capacitance.25c.VR=1'],
			['10.9 to 12.7', 'pF', 'capacitance.25c.VR=4'],
			['1.91 to 2.21', 'pF', 'capacitance.25c.VR=28'],
			['30', 'V max', 'ratings.reverse-voltage']
		]);
	});

	it('prints ratings with who typed them and why, in SI for machines', () => {
		const [ratings] = sectionOf(document, 'ratings');
		expect(ratings?.rows.map(({ slot }) => slot)).toEqual([
			'ratings.reverse-voltage',
			'ratings.power',
			'ratings.junction-temperature'
		]);
		expect(ratings?.rows[1]).toMatchObject({
			maximum: { text: '250', value: 0.25 },
			unit: 'mW',
			by: 'Ida Sandvik',
			reason: 'package family'
		});
		expect(ratings?.rows[2]).toMatchObject({ minimum: { text: '−55', value: -55 } });
	});

	it('says on what the limits rest', () => {
		expect(document.basisNotes).toEqual([
			{
				basis: 'characterized',
				mark: 'C',
				text: `characterized on 300 devices of 3 independent lots: ${sheetTexts.eachLimit('95\u00a0%', '95\u00a0%', 'devices')}`
			}
		]);
		expect(document.footnotes).toEqual([
			sheetTexts.typicalValues(),
			sheetTexts.rounding(),
			sheetTexts.statistical(),
			sheetTexts.deviations(),
			sheetTexts.ratio('28')
		]);
	});

	it('promises future lots where the policy does', () => {
		const policies = new Map([[1, samplePolicy(1, { method: 'lots', tails: 'both' })]]);
		const ofLots = resolve({ ...completeDraft(), policies }).document;
		expect(ofLots?.basisNotes[0]?.text).toContain(
			sheetTexts.bothLimits('95\u00a0%', '95\u00a0%', sheetTexts.futureDevices())
		);
	});

	it('leaves open and struck-out places off the sheet, and shows open ones on the proof', () => {
		const ids = (of: DatasheetDocument) =>
			sectionOf(of, 'characteristics').flatMap(({ rows }) => rows.map(({ slot }) => slot));
		expect(ids(document)).toEqual([
			'characteristics.capacitance-1v',
			'characteristics.capacitance-28v'
		]);
		expect(ids(proof)).toEqual([
			'characteristics.breakdown-voltage',
			'characteristics.capacitance-1v',
			'characteristics.capacitance-28v',
			'characteristics.capacitance-4v-85c'
		]);
		expect(open.map(({ id, state }) => [id, state])).toEqual([
			['ratings.repetitive-reverse-voltage', 'unbound'],
			['ratings.forward-current', 'unbound'],
			['ratings.storage-temperature', 'unbound'],
			['thermal.junction-to-ambient', 'unbound'],
			['characteristics.breakdown-voltage', 'unbound'],
			['characteristics.capacitance-4v-85c', 'unbound']
		]);
	});
});

describe('both templates, as data', () => {
	it('the tuning diode resolves to the golden document', async () => {
		const { document } = resolve(completeDraft());
		await expect(`${JSON.stringify(document, null, '\t')}\n`).toMatchFileSnapshot(
			'../../../../tests/golden/tuning.document.snap'
		);
	});

	it('a preliminary rectifier resolves to the golden document', async () => {
		const { document, problems } = resolve(rectifierDraft());
		expect(problems).toEqual([]);
		await expect(`${JSON.stringify(document, null, '\t')}\n`).toMatchFileSnapshot(
			'../../../../tests/golden/rectifier.document.snap'
		);
	});
});

/** One lot of a rectifier: typical values alone, on a table with thousands of picofarads. */
function rectifierDraft(): ResolveInput {
	const rows = (
		[
			[0, '1510'],
			[1, '905'],
			[4, '540']
		] as const
	).map(([bias, typical]) =>
		limitRowOf({ bias, texts: [null, typical, null], basis: 'typical', independentLots: 1 })
	);
	const bindings = new Map<string, Binding>([
		['ratings.repetitive-reverse-voltage', rating(null, '60')],
		['ratings.forward-current', rating(null, '2.0')],
		[
			'capacitance.25c',
			{
				kind: 'table',
				rows: rows.map((row) => ({
					bias: row.condition.reverseVoltage ?? 0,
					binding: boundTo(row, { basis: 'typical' })
				}))
			}
		]
	]);
	return {
		...completeDraft(),
		template: projectTemplate('rectifier'),
		status: 'preliminary',
		product: {
			partNumber: 'LKR-2406',
			productClass: 'rectifier',
			package: 'SOD-123',
			description: ''
		},
		orderingCodes: [],
		bindings,
		texts: new Map(),
		limits: new Map([['capacitance.25c', rows]])
	};
}

describe('what a production datasheet needs', () => {
	it('every essential place bound, or struck out', () => {
		const input = withBindings(completeDraft(), {
			'ratings.reverse-voltage': null,
			'characteristics.reverse-current': null
		});
		expect(messagesOf(input)).toContainEqual([
			'ratings.reverse-voltage',
			draftMessages.essentialUnbound()
		]);
		expect(messagesOf(input)).toContainEqual([
			'characteristics.reverse-current',
			draftMessages.essentialUnbound()
		]);
	});

	it('an essential row of the table too', () => {
		expect(messagesOf(withTableRow(completeDraft(), 12, null))).toEqual([
			['capacitance.25c.VR=12', draftMessages.essentialUnbound()]
		]);
		expect(messagesOf(withTableRow(completeDraft(), 12, struckOut()))).toEqual([]);
	});

	it('nothing stale: the old number stays printed until somebody decides', () => {
		const moved = limitRowOf({ bias: 15, texts: ['3.41', '3.78', '4.11'] });
		const input = withMeasured(completeDraft(), 15, moved);
		expect(messagesOf(input)).toEqual([['capacitance.25c.VR=15', draftMessages.settleStale()]]);
		const slot = resolve(input).slots.find(({ id }) => id === 'capacitance.25c.VR=15');
		expect(slot).toMatchObject({
			state: 'stale',
			prints: { minimum: '3.47' },
			current: { minimum: '3.41' },
			problem: draftMessages.stale('3.47 / 3.78 / 4.11 pF', '3.41 / 3.78 / 4.11 pF')
		});
	});

	it('nothing unsupported', () => {
		const refused = limitRowOf({ bias: 15, texts: [null, '3.78', null], refusals: ['Why.'] });
		for (const row of [refused, null])
			expect(messagesOf(withMeasured(completeDraft(), 15, row))).toEqual([
				['capacitance.25c.VR=15', draftMessages.settleUnsupported()]
			]);
	});

	it('an override with its reason passes, and keeps the trace of what it prints', () => {
		const moved = limitRowOf({ bias: 15, texts: ['3.41', '3.78', '4.11'] });
		const kept = { reason: 'one lot', by: 'Ida Sandvik', at: AT, against: textsOf(moved) };
		const input = withTableRow(
			withMeasured(completeDraft(), 15, moved),
			15,
			boundTo(tuningRow(15), { kept })
		);
		const { problems, document } = resolve(input);
		expect(problems).toEqual([]);
		const row = sectionOf(document, 'capacitance-table')[0]?.rows.find(
			({ bias }) => bias.value === 15
		);
		expect(row).toMatchObject({
			state: 'overridden',
			minimum: { text: '3.47' },
			trace: tuningRow(15).inputHash
		});
	});

	it('enough lots and devices for the policy behind every promise', () => {
		const thin = limitRowOf({
			bias: 15,
			texts: ['3.47', '3.78', '4.11'],
			sampleSize: 20,
			independentLots: 1
		});
		const input = withTableRow(withMeasured(completeDraft(), 15, thin), 15, boundTo(thin));
		expect(messagesOf(input)).toEqual([
			['capacitance.25c.VR=15', draftMessages.tooFewLots(3, 1, 'Characterized 95/95')],
			['capacitance.25c.VR=15', draftMessages.tooFewDevices(30, 20, 'Characterized 95/95')]
		]);
	});

	it('a measured limit at all', () => {
		const bindings = new Map(
			[...completeDraft().bindings].map(([slot, binding]): [string, Binding] => [
				slot,
				binding.kind === 'rating' ? binding : struckOut()
			])
		);
		const input = { ...completeDraft(), bindings, texts: new Map<string, string>() };
		expect(messagesOf(input)).toContainEqual([
			'status',
			draftMessages.nothingPrinted('production')
		]);
		expect(messagesOf({ ...input, status: 'preliminary' })).toContainEqual([
			'status',
			draftMessages.nothingPrinted('preliminary')
		]);
	});

	it('no mean ± kσ as a guarantee by itself, only behind a test of every device', () => {
		const policies = new Map([[1, samplePolicy(1, { name: 'House rule', method: 'sigma', k: 3 })]]);
		const characterized = resolve({ ...completeDraft(), policies });
		expect(characterized.slots.find(({ id }) => id === 'capacitance.25c.VR=4')).toMatchObject({
			state: 'unsupported',
			current: { minimum: null, typical: '11.8', maximum: null }
		});
		const row = tuningRow(4);
		const tested = withTableRow(
			{ ...completeDraft(), policies },
			4,
			boundTo(row, { basis: 'tested', basisReason: 'final test, program 7' })
		);
		expect(resolve(tested).slots.find(({ id }) => id === 'capacitance.25c.VR=4')).toMatchObject({
			state: 'bound',
			prints: { minimum: '10.9', maximum: '12.7' }
		});
	});
});

describe('contradictions, whatever the status', () => {
	const replaced = (bias: number, texts: readonly [string, string, string]) => {
		const row = limitRowOf({ bias, texts });
		return withTableRow(withMeasured(completeDraft(), bias, row), bias, boundTo(row));
	};

	it('a minimum above the typical value, a typical value above the maximum', () => {
		const input = replaced(15, ['3.79', '3.78', '3.77']);
		for (const status of ['target', 'preliminary', 'production'] as const)
			expect(messagesOf({ ...input, status })).toEqual([
				['capacitance.25c.VR=15', draftMessages.outOfOrder('minimum', 'typical')],
				['capacitance.25c.VR=15', draftMessages.outOfOrder('typical', 'maximum')]
			]);
	});

	it('capacitance that rises with reverse bias', () => {
		expect(messagesOf(replaced(15, ['3.47', '3.78', '5.09']))).toEqual([
			['capacitance.25c.VR=15', draftMessages.rises('maximum', '15', '12')]
		]);
	});

	it('a row above the reverse voltage rating', () => {
		const input = withBindings(completeDraft(), { 'ratings.reverse-voltage': rating(null, '25') });
		expect(messagesOf(input)).toEqual([
			['characteristics.capacitance-28v', draftMessages.beyondRating('28', '25')],
			['capacitance.25c.VR=28', draftMessages.beyondRating('28', '25')]
		]);
	});

	it('the same quantity printed differently in two places', () => {
		const other = limitRowOf({ bias: 1, texts: ['23.4', '25.0', '26.6'] });
		const input = withBindings(completeDraft(), {
			'characteristics.capacitance-1v': boundTo(other)
		});
		const limits = new Map([...input.limits, ['characteristics.capacitance-1v', [other]]] as const);
		expect(messagesOf({ ...input, limits })).toEqual([
			[
				'capacitance.25c.VR=1',
				draftMessages.differsFrom('C_tot at V_R = 1\u00a0V, f = 1\u00a0MHz, T_j = 25\u00a0°C')
			]
		]);
	});

	// (150 °C − 25 °C) / 500 K/W = 250 mW.
	it('more power than the thermal resistance allows', () => {
		const template = projectTemplate('tuning');
		const sections = template.sections.map((section) =>
			section.kind === 'ratings'
				? {
						...section,
						slots: [
							...section.slots,
							{
								slot: 'ratings.thermal-resistance',
								symbol: { quantity: 'R', subscript: 'th(j-a)' },
								name: 'thermal resistance',
								conditions: '',
								unit: 'K/W',
								ends: 'maximum' as const,
								essential: false
							}
						]
					}
				: section
		);
		const base = { ...completeDraft(), template: { ...template, sections } };
		const at = (resistance: string) =>
			messagesOf(withBindings(base, { 'ratings.thermal-resistance': rating(null, resistance) }));
		expect(at('500')).toEqual([]);
		expect(at('520')).toEqual([
			['ratings.power', draftMessages.powerContradicts('250\u00a0mW', '240\u00a0mW')]
		]);
	});
});

describe('a text that can’t be filled', () => {
	const written = (headline: string) =>
		resolve({ ...completeDraft(), texts: new Map([['headline', headline]]) });

	it.each([
		['ab {C_tot @ V_R=5 V : typ}', 3, draftMessages.placeholderUnknown('{C_tot @ V_R=5 V : typ}')],
		[
			'{C_tot @ V_R=4 V, T_j=85 °C : min}',
			0,
			draftMessages.placeholderNoValue('{C_tot @ V_R=4 V, T_j=85 °C : min}', 'minimum')
		],
		['x\n\n y {V_R : typ}', 6, draftMessages.placeholderNoValue('{V_R : typ}', 'typical value')],
		['{what}', 0, draftMessages.placeholderUnread('{what}')],
		['open {C_tot', 5, draftMessages.placeholderOpen()]
	])('%j is told with its position', (headline, position, message) => {
		const { problems, document } = written(headline);
		expect(problems).toEqual([{ place: 'headline', label: 'headline', message, position }]);
		const [prose] = sectionOf(document, 'prose');
		const shown = prose?.paragraphs.map(plainText).join(' ') ?? '';
		expect(shown).toContain(headline.slice(position).trim());
	});

	it('blocks a target datasheet too', () => {
		const input = { ...completeDraft(), texts: new Map([['headline', '{what}']]) };
		expect(messagesOf({ ...input, status: 'target' })).toEqual([
			['headline', draftMessages.placeholderUnread('{what}')]
		]);
	});
});

describe('the other statuses', () => {
	it('a target needs nothing and says that its numbers are aims', () => {
		const input: ResolveInput = {
			...completeDraft(),
			status: 'target',
			bindings: new Map(),
			texts: new Map(),
			limits: new Map()
		};
		const { problems, document } = resolve(input);
		expect(problems).toEqual([]);
		expect(document.footnotes).toEqual([sheetTexts.target()]);
		expect(document.sections.map(({ kind }) => kind)).toEqual([
			'masthead',
			'terminals',
			'ordering',
			'revision-history',
			'notice'
		]);
	});

	it('a preliminary one rests on a lot and says that its limits are provisional', () => {
		const input = withBindings(completeDraft({ status: 'preliminary' }), {
			'characteristics.reverse-current': null
		});
		const { problems, document } = resolve(input);
		expect(problems).toEqual([]);
		expect(document.footnotes[0]).toBe(sheetTexts.preliminary());
	});
});

it('prints a whole table in the unit of most of its rows, digits kept', () => {
	const row = limitRowOf({
		bias: 1,
		texts: ['0.0235', '0.0250', '0.0266'],
		unit: 'nF',
		unitScale: 1e-9
	});
	const input = withTableRow(withMeasured(completeDraft(), 1, row), 1, boundTo(row));
	const [table] = sectionOf(resolve(input).document, 'capacitance-table');
	expect(table?.unit).toBe('pF');
	expect(table?.rows[1]).toMatchObject({
		minimum: { text: '23.5', value: 23.5e-12 },
		typical: { text: '25.0' }
	});
});

it('gives the same bytes for the same parts, and changes none of them', () => {
	const draft = completeDraft();
	const bytes = (of: DatasheetDocument) => new TextDecoder().decode(canonicalBytes(of));
	const texts = fc.stringMatching(/^[A-Za-z0-9_ {}@:=.,\n-]{0,60}$/);
	const measured = fc.subarray([...TUNING_ROWS]);
	fc.assert(
		fc.property(texts, measured, (headline, rows) => {
			const input: ResolveInput = Object.freeze({
				...draft,
				texts: new Map([['headline', headline]]),
				limits: new Map([['capacitance.25c', Object.freeze(rows)]])
			});
			const [one, other] = [resolve(input), resolve(input)];
			expect(bytes(one.document)).toBe(bytes(other.document));
			expect(bytes(one.proof)).toBe(bytes(other.proof));
		}),
		{ numRuns: 25 }
	);
});
