import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import type { CapacitanceModel } from '../../src/lib/core/junction/capacitanceModel';
import { spiceCapacitance } from '../../src/lib/core/junction/spiceParameters';
import { spiceDiode, spiceModel } from '../../src/lib/core/junction/spiceModel';

const BIASES = [-0.45, 0, 0.5, 1, 2, 4, 8, 15, 28];
const TEMPERATURES = [-40, 25, 85];
const NOMINAL = 25;

const MODELS: Readonly<Record<string, CapacitanceModel>> = {
	ABRUPT: model(15e-12, 0.75, 0.5, 0.2e-12),
	GRADED: model(4.8e-11, 0.62, 0.333, 0),
	STEEP: model(3e-11, 0.9, 0.9, 0.1e-12),
	HYPER: model(5e-11, 1.2, 1.0, 0.3e-12),
	HYPER2: model(4e-11, 2.5, 1.5, 0.25e-12),
	HYPER3: model(6e-11, 5, 2, 0.4e-12),
	WIDE: model(1e-11, 4, 0.6, 0.1e-12)
};

function model(c0: number, vj: number, m: number, cCase: number): CapacitanceModel {
	return {
		zeroBiasCapacitance: c0,
		junctionPotential: vj,
		gradingExponent: m,
		caseCapacitance: cCase
	};
}

/** One circuit: every model at every bias, the small-signal capacitance at 1 MHz printed. */
function circuit(celsius: number): string {
	const names = Object.keys(MODELS);
	const probes = names.flatMap((name) => BIASES.map((bias) => ({ name, bias })));
	return [
		'* capacitance of exported models',
		...names.map((name) =>
			spiceModel({ name, capacitance: MODELS[name]!, nominalCelsius: NOMINAL })
		),
		...probes.flatMap(({ name, bias }, i) => [
			`v${i} a${i} 0 dc ${-bias} ac 1`,
			`x${i} a${i} 0 ${name}`
		]),
		`.options temp=${celsius} gmin=1e-15 abstol=1e-18`,
		'.control',
		'set numdgts=12',
		'ac lin 1 1e6 1e6',
		...probes.map((_, i) => `let c${i} = -imag(i(v${i}))/(2*pi*1e6)`),
		...probes.map((_, i) => `print c${i}`),
		'.endc',
		'.end'
	].join('\n');
}

function runNgspice(deck: string): string {
	const folder = mkdtempSync(join(tmpdir(), 'platen-ngspice-'));
	try {
		const file = join(folder, 'probe.cir');
		writeFileSync(file, deck);
		const run = spawnSync('ngspice', ['-b', file], { encoding: 'utf8', timeout: 30_000 });
		if (run.error) throw run.error;
		return run.stdout;
	} finally {
		rmSync(folder, { recursive: true });
	}
}

// Debian's ngspice 39, AC analysis at 1 MHz of the exported text, M up to 2
it.each(TEMPERATURES)('agrees with ngspice to 0.1 per cent at %i °C', (celsius) => {
	const output = runNgspice(circuit(celsius));
	const printed = [...output.matchAll(/^c(\d+) = (\S+)/gm)].map((match) => Number(match[2]));
	const expected = Object.entries(MODELS).flatMap(([name, capacitance]) => {
		const diode = spiceDiode({ name, capacitance, nominalCelsius: NOMINAL });
		const at = { temperature: celsius + 273.15, nominal: NOMINAL + 273.15 };
		return BIASES.map((bias) => ({
			name,
			bias,
			value: spiceCapacitance(diode, bias, at) + capacitance.caseCapacitance
		}));
	});
	expect(printed).toHaveLength(expected.length);
	const strays = expected.flatMap(({ name, bias, value }, i) => {
		const error = Math.abs(printed[i]! / value - 1);
		return error < 1e-3 ? [] : [`${name} at ${bias} V: ${printed[i]} against ${value}`];
	});
	expect(strays).toEqual([]);
});
