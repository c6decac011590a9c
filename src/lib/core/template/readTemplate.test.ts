import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readTemplate, TemplateError } from './readTemplate';

const TUNING = readFileSync('templates/tuning.json', 'utf8');

/** The project's tuning template with one thing changed. */
function changed(change: (template: { sections: Record<string, unknown>[] }) => void): string {
	const json = JSON.parse(TUNING) as { sections: Record<string, unknown>[] };
	change(json);
	return JSON.stringify(json);
}

function problemsOf(text: string): readonly string[] {
	try {
		readTemplate(text, 'tuning.json');
	} catch (problem) {
		if (problem instanceof TemplateError) return problem.problems;
		throw problem;
	}
	return [];
}

const section = (sections: Record<string, unknown>[], kind: string) => {
	const found = sections.find((one) => one['kind'] === kind);
	if (found === undefined) throw new Error(`no section ${kind}`);
	return found;
};

describe('the project’s templates', () => {
	it.each([
		['tuning', 'tuning'],
		['rectifier', 'rectifier']
	])('%s is one, says its sources, and what of them is from memory', (key, productClass) => {
		const template = readTemplate(readFileSync(`templates/${key}.json`, 'utf8'), key);
		expect(template.key).toBe(key);
		expect(template.productClass).toBe(productClass);
		expect(template.sources).toMatch(/IEC 60747-[24].*from memory/);
	});

	it('state what their class must have', () => {
		const essentials = (key: string) =>
			readTemplate(readFileSync(`templates/${key}.json`, 'utf8'), key).sections.flatMap((one) =>
				one.kind === 'ratings' || one.kind === 'thermal' || one.kind === 'characteristics'
					? one.slots.filter(({ essential }) => essential).map(({ slot }) => slot)
					: []
			);
		// Essentials by class from memory of IEC 60747-4 and 60747-2 (references/NOTES.md).
		expect(essentials('tuning')).toEqual([
			'ratings.reverse-voltage',
			'ratings.junction-temperature',
			'characteristics.reverse-current',
			'characteristics.capacitance-1v',
			'characteristics.capacitance-28v',
			'characteristics.capacitance-ratio',
			'characteristics.series-resistance'
		]);
		expect(essentials('rectifier')).toEqual([
			'ratings.repetitive-reverse-voltage',
			'ratings.forward-current',
			'ratings.surge-current',
			'ratings.junction-temperature',
			'ratings.storage-temperature',
			'characteristics.thermal-resistance',
			'characteristics.forward-voltage',
			'characteristics.reverse-current'
		]);
	});
});

describe('what is no template is refused with its path', () => {
	it('when it is no JSON', () => {
		expect(problemsOf('{')).toEqual(['expected JSON']);
	});

	it('when a value has the wrong type', () => {
		const text = changed(({ sections }) => {
			section(sections, 'capacitance-table')['temperatureCelsius'] = '25';
		});
		expect(problemsOf(text)).toEqual([
			'sections.10.temperatureCelsius: Invalid input: expected number, received string'
		]);
	});

	it('when a key is used twice', () => {
		const text = changed(({ sections }) => {
			section(sections, 'capacitance-table')['slot'] = 'ratings.reverse-voltage';
			section(sections, 'capacitance-chart')['table'] = 'ratings.reverse-voltage';
			section(sections, 'headline-figures')['slots'] = [];
		});
		expect(problemsOf(text)).toEqual([
			'sections.10.slot: expected a key used once, got "ratings.reverse-voltage" again',
			'sections.13.source.table: expected the slot of a table, got "capacitance.25c"',
			'sections.17.table: expected the slot of a table, got "capacitance.25c"'
		]);
	});

	it('when biases don’t rise, or the ratio is to none of them', () => {
		const text = changed(({ sections }) => {
			section(sections, 'headline-figures')['slots'] = [];
			Object.assign(section(sections, 'capacitance-table'), { biases: [1, 1], ratioTo: 28 });
		});
		expect(problemsOf(text)).toEqual([
			'sections.10.biases: expected biases that rise',
			'sections.10.ratioTo: expected one of the biases, got 28'
		]);
	});

	it('when a chart or a figure leads nowhere', () => {
		const text = changed(({ sections }) => {
			section(sections, 'capacitance-chart')['table'] = 'nowhere';
			section(sections, 'headline-figures')['slots'] = ['capacitance.25c.29'];
		});
		expect(problemsOf(text)).toEqual([
			'sections.2.slots.0: expected a slot of this template, got "capacitance.25c.29"',
			'sections.11.table: expected the slot of a table, got "nowhere"'
		]);
	});
});
