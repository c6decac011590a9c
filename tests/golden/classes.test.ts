import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { resolve } from '../../src/lib/core/datasheet/resolve';
import type { Binding } from '../../src/lib/core/datasheet/binding';
import { readTemplate } from '../../src/lib/core/template/readTemplate';
import {
	CLASS_NAMES,
	PRODUCT_CLASSES,
	type ProductClass
} from '../../src/lib/core/template/template';
import { renderDatasheet } from '../../src/lib/server/pdf/renderDatasheet';
import { completeDraft } from '../factories/draftParts';
import { draftRecord } from './sampleDatasheets';
import { runOn } from './tools';

const PACKAGE = {
	rectifier: 'DO-214AC',
	'detector-mixer': '0402',
	tuning: 'SOD-323',
	switching: 'SOD-123',
	pin: 'SOT-23'
} as const satisfies Record<ProductClass, string>;

/** A target of this class with every rating typed: limits are bound later. */
function target(productClass: ProductClass) {
	const file = `templates/${productClass}.json`;
	const template = readTemplate(readFileSync(file, 'utf8'), file);
	const slots = template.sections.flatMap((section) =>
		section.kind === 'ratings' ? section.slots : []
	);
	const rated = (ends: (typeof slots)[number]['ends']): Binding => ({
		kind: 'rating',
		minimum: ends === 'maximum' ? null : '−55',
		maximum: ends === 'minimum' ? null : '150',
		reason: 'design rule',
		by: 'Ida Sandvik',
		at: '2026-01-05T08:00:00.000Z'
	});
	const base = completeDraft();
	return resolve({
		...base,
		template,
		status: 'target',
		product: { ...base.product, productClass, package: PACKAGE[productClass] },
		bindings: new Map(slots.map(({ slot, ends }) => [slot, rated(ends)])),
		texts: new Map(),
		limits: new Map()
	});
}

describe.each(PRODUCT_CLASSES)('a target of the class %s', (productClass) => {
	const { document, proof } = target(productClass);

	it('prints its ratings, its terminals and its package', async () => {
		const bytes = await renderDatasheet(document, draftRecord);
		const read = runOn(bytes, 'pdftotext', (file) => ['-layout', file, '-']);
		for (const words of [
			CLASS_NAMES[productClass],
			'Terminals and marking',
			'Limiting values',
			'virtual junction temperature',
			`package ${PACKAGE[productClass]}`,
			'Suggested land pattern'
		])
			expect(read).toContain(words);
		expect(runOn(bytes, 'qpdf', (file) => ['--check', file])).toContain('No syntax');
	});

	it('shows on its proof what is still to be bound', async () => {
		const read = runOn(await renderDatasheet(proof, draftRecord), 'pdftotext', (file) => [
			'-layout',
			file,
			'-'
		]);
		expect(read).toContain('Thermal characteristics');
		expect(read).toContain('unbound');
		expect(read).toContain('Total capacitance against reverse voltage');
	});
});
