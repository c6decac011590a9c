import { describe, expect, it } from 'vitest';
import { productMessages as say } from '$lib/core/messages/products';
import { dieFactsOf, dieFields, dieForm, newDie, presetFields } from './dieForm';

const typed = () => ({ ...newDie(), name: 'D-40', area: '0.042' });

const messagesOf = (given: unknown) => {
	const parsed = dieForm.safeParse(given);
	return parsed.success
		? {}
		: Object.fromEntries(parsed.error.issues.map(({ path, message }) => [path.join('.'), message]));
};

describe('the form of a die', () => {
	it('stores the area in m² and densities in m⁻³, by shifting the point', () => {
		const facts = dieFactsOf(dieForm.parse(typed()));
		expect(facts.area).toBe(4.2e-8);
		expect(facts.material.conductionStates).toBe(2.8e25);
		expect(facts.material.valenceStates).toBe(1.04e25);
	});

	it('shows what it stored, digit for digit', () => {
		const form = dieForm.parse({ ...typed(), area: '0.7', conductionStates: '1.04e19' });
		const shown = dieFields({ name: form.name, facts: dieFactsOf(form), rowVersion: 3 });
		expect(shown).toEqual({ ...form, rowVersion: 3 });
	});

	it('reads a decimal comma', () => {
		expect(dieFactsOf(dieForm.parse({ ...typed(), area: '0,042' })).area).toBe(4.2e-8);
	});

	it.each([
		['name', '', say.dieNameNeeded()],
		['name', 'x'.repeat(61), say.tooLong(60)],
		['area', '', say.areaFormat()],
		['area', '0', say.areaFormat()],
		['area', '-1', say.areaFormat()],
		['area', '1.2 mm²', say.areaFormat()],
		['relativePermittivity', '1', say.permittivityFormat()],
		['conductionStates', '2.8x19', say.statesFormat()],
		['valenceStates', '0', say.statesFormat()],
		['source', ' ', say.sourceNeeded()],
		['conductivity', 'i', say.choose()],
		['junction', 'heterojunction', say.choose()]
	])('refuses %s "%s" beside the field', (field, value, message) =>
		expect(messagesOf({ ...typed(), [field]: value })).toEqual({ [field]: message })
	);

	it('fills constants and their source from a preset, and nothing from an unknown one', () => {
		expect(presetFields('gaas')).toMatchObject({
			materialName: 'GaAs',
			relativePermittivity: '13.1',
			conductionStates: '4.7e17'
		});
		expect(presetFields('diamond')).toEqual({});
	});
});
