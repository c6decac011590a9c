import { describe, expect, it } from 'vitest';
import { productMessages as say } from '$lib/core/messages/products';
import { orderingCodesOf, productFields, productForm, withoutRow, withRow } from './productForm';

const typed = () => ({
	partNumber: 'LKT-1130',
	die: 1,
	elements: '1',
	productClass: 'tuning' as const,
	package: 'SOD-323',
	description: 'Hyperabrupt tuning diode',
	code: ['LKT-1130-T', 'LKT-1130-R'],
	grade: ['standard', 'standard'],
	marking: ['K1', 'K1'],
	packing: ['tape', 'reel'],
	quantity: ['3000', '10000'],
	rowVersion: 2
});

const messagesOf = (given: unknown) => {
	const parsed = productForm.safeParse(given);
	return parsed.success
		? {}
		: Object.fromEntries(parsed.error.issues.map(({ path, message }) => [path.join('.'), message]));
};

describe('the form of a product', () => {
	it('gives the ordering codes row by row', () => {
		expect(orderingCodesOf(productForm.parse(typed()))).toEqual([
			{ code: 'LKT-1130-T', grade: 'standard', marking: 'K1', packing: 'tape', quantity: 3000 },
			{ code: 'LKT-1130-R', grade: 'standard', marking: 'K1', packing: 'reel', quantity: 10_000 }
		]);
	});

	it('shows a stored product as it was typed', () => {
		const form = productForm.parse(typed());
		const { elements, die, ...rest } = form;
		const stored = {
			...rest,
			die,
			elements: Number(elements),
			orderingCodes: orderingCodesOf(form)
		};
		expect(productFields(stored)).toEqual(form);
	});

	it.each([
		['partNumber', '', say.partNumberNeeded()],
		['partNumber', 'LKT 1130', say.partNumberFormat()],
		['partNumber', '-LKT', say.partNumberFormat()],
		['partNumber', 'LKT/1130', say.partNumberFormat()],
		['partNumber', 'L'.repeat(61), say.partNumberFormat()],
		['die', '0', say.dieNeeded()],
		['elements', '0', say.elementsRange()],
		['elements', '17', say.elementsRange()],
		['elements', '1.5', say.elementsRange()],
		['productClass', 'laser', say.classNeeded()],
		['package', ' ', say.packageNeeded()],
		['description', 'x'.repeat(201), say.tooLong(200)]
	])('refuses %s "%s" beside the field', (field, value, message) =>
		expect(messagesOf({ ...typed(), [field]: value })).toEqual({ [field]: message })
	);

	it.each([
		[{ code: ['', 'B'] }, { 'code.0': say.codeNeeded() }],
		[{ code: ['A B', 'B'] }, { 'code.0': say.codeFormat() }],
		[{ code: ['A', 'A'] }, { 'code.1': say.codeTwice('A') }],
		[{ quantity: ['3000', '0'] }, { 'quantity.1': say.quantityFormat() }],
		[{ quantity: ['3000'] }, { 'quantity.1': say.quantityFormat() }],
		[{ quantity: ['3 000', '1'] }, { 'quantity.0': say.quantityFormat() }],
		[{ packing: ['x'.repeat(41), ''] }, { 'packing.0': say.tooLong(40) }]
	])('refuses ordering codes %j', (change, messages) =>
		expect(messagesOf({ ...typed(), ...change })).toEqual(messages)
	);

	it('takes a product without ordering codes', () => {
		const none = { code: [], grade: [], marking: [], packing: [], quantity: [] };
		expect(orderingCodesOf(productForm.parse({ ...typed(), ...none }))).toEqual([]);
	});

	it('adds and removes a row in all its columns', () => {
		const form = Object.freeze(productForm.parse(typed()));
		expect(withRow(form)).toMatchObject({
			code: ['LKT-1130-T', 'LKT-1130-R', ''],
			quantity: ['3000', '10000', '']
		});
		expect(withoutRow(form, 0)).toMatchObject({ code: ['LKT-1130-R'], packing: ['reel'] });
	});
});
