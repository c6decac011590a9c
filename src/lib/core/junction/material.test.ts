import { describe, expect, it } from 'vitest';
import { findMaterialPreset, material, MATERIAL_PRESETS } from './material';

const BOLTZMANN = 1.380649e-23; // J/K, exact since the SI of 2019
const PLANCK = 6.62607015e-34; // J·s, exact since the SI of 2019
const ELECTRON_MASS = 9.1093837015e-31; // kg, CODATA 2018

/** Effective mass, relative, that a density of states stands for: N = 2 (2π m k T / h²)^1.5. */
const relativeMass = (states: number) =>
	((states / 2) ** (2 / 3) * PLANCK ** 2) / (2 * Math.PI * BOLTZMANN * 300) / ELECTRON_MASS;

describe('material presets', () => {
	it.each(Object.entries(MATERIAL_PRESETS))(
		'%s is complete and says its source',
		(_key, preset) => {
			expect(material.parse(preset)).toEqual(preset);
			expect(preset.source).toMatch(/^From memory: /);
		}
	);

	// Effective masses for the density of states, from memory of the same handbooks: a slip of a power
	// of ten or of a unit would show at once.
	it.each([
		['si', 1.08, 0.55],
		['gaas', 0.067, 0.47],
		['4h-sic', 0.77, 1.0],
		['gan', 0.2, 1.5],
		['ge', 0.55, 0.39]
	])('%s has densities that fit its effective masses within a tenth', (key, electrons, holes) => {
		const preset = findMaterialPreset(key);
		if (preset === undefined) throw new Error(`no preset ${key}`);
		expect(Math.abs(relativeMass(preset.conductionStates) / electrons - 1)).toBeLessThan(0.1);
		expect(Math.abs(relativeMass(preset.valenceStates) / holes - 1)).toBeLessThan(0.1);
	});

	it('gives nothing for a key it does not have', () => {
		expect(findMaterialPreset('diamond')).toBeUndefined();
		expect(findMaterialPreset('toString')).toBeUndefined();
	});

	it('refuses a permittivity below vacuum, no density and no source', () => {
		const si = MATERIAL_PRESETS.si;
		expect(material.safeParse({ ...si, relativePermittivity: 0.9 }).success).toBe(false);
		expect(material.safeParse({ ...si, valenceStates: 0 }).success).toBe(false);
		expect(material.safeParse({ ...si, source: ' ' }).success).toBe(false);
	});
});
