import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { z } from 'zod';
import { ConditionColumns } from '../../src/lib/core/distributions/conditionColumns';
import { computeDistribution } from '../../src/lib/core/distributions/computeDistribution';
import { indexDevices, type DeviceIndex } from '../../src/lib/core/distributions/indexDevices';
import type { Distribution } from '../../src/lib/core/distributions/summary';
import { RESULT_WIDTH } from '../../src/lib/core/junction/capacitanceFitResult';
import { fitSweeps } from '../../src/lib/core/junction/fitCapacitance';
import { computeLimitRow } from '../../src/lib/core/limits/computeLimitRow';
import { limitPolicy, type LimitMethod } from '../../src/lib/core/limits/policy';
import { deviceColumns, unpackMatrix } from '../../src/lib/core/measurements/blocks';

/*
 * The engine's side of the benchmark: from packed blocks on disk to fits, distributions with their
 * components, and the table of each policy. What took how long, and the numbers to compare, go to a
 * file as JSON.
 */

const folder = process.argv[2] ?? '.';
const plan = z
	.object({
		biases: z.array(z.number()),
		temperatures: z.array(z.number()),
		rowsPerBlock: z.number(),
		blocks: z.number(),
		devices: z.array(deviceColumns)
	})
	.parse(JSON.parse(readFileSync(join(folder, 'plan.json'), 'utf8')));

/** The four methods with what they are asked for in a table of both sides. */
const POLICIES = (['lots', 'normal', 'order', 'sigma'] as const).map((method) =>
	limitPolicy.parse({
		name: method,
		method,
		content: 0.99,
		confidence: 0.95,
		tails: 'each',
		k: 4,
		minimumLots: 3,
		minimumDevices: 30,
		resolution: { significantFigures: 4 }
	})
);

let spent: Record<string, number> = {};

/** CPU time of the process, so that a busy machine does not count. */
function measured<Result>(name: string, work: () => Result): Result {
	const before = process.cpuUsage();
	const result = work();
	const { user, system } = process.cpuUsage(before);
	spent[name] = (spent[name] ?? 0) + (user + system) / 1e6;
	return result;
}

function readBlocks(temperature: number): Float64Array[] {
	return Array.from({ length: plan.blocks }, (_, block) =>
		unpackMatrix(readFileSync(join(folder, `${temperature}-${block}.bin`)))
	);
}

function distributionsOf(
	temperature: number,
	blocks: readonly Float64Array[],
	index: DeviceIndex
): Distribution[] {
	const columns = new ConditionColumns(index);
	for (const [block, values] of blocks.entries()) {
		columns.add(
			{ set: 1, firstRow: block * plan.rowsPerBlock, grid: plan.biases, unitScale: 1, values },
			() => false
		);
	}
	return columns.columns().map(({ bias, values, sets }) => {
		const distribution = computeDistribution({
			characteristic: 'capacitance',
			conditionKey: `${temperature}/${bias}`,
			unit: 'F',
			transform: 'ln',
			values,
			groupOf: index.groupOf,
			groups: index.groups,
			sets,
			uncertainty: 0.005,
			excluded: 0,
			quarantined: 0
		});
		if (distribution === undefined) throw new Error(`no device at ${bias} V`);
		return distribution;
	});
}

function rowOf(distribution: Distribution, method: LimitMethod, temperature: number, bias: number) {
	const rules = POLICIES.find((policy) => policy.method === method);
	if (rules === undefined) throw new Error(`no policy for ${method}`);
	return computeLimitRow(distribution, rules, {
		policyVersion: 1,
		condition: { temperatureCelsius: temperature, frequency: 1e6, reverseVoltage: bias },
		unit: 'pF',
		unitScale: 1e-12,
		inputHash: 'bench',
		declaredBasis: 'tested'
	});
}

/** The whole work once. */
function work() {
	spent = {};
	const fits: number[] = [];
	const means: number[] = [];
	const deviations: number[] = [];
	const lotComponents: number[] = [];
	const darling: number[] = [];
	const limits: Record<string, number[]> = { lots: [], normal: [], order: [], sigma: [] };
	const kept: Distribution[] = [];
	let fitted = 0;
	const index = measured('distributions', () =>
		indexDevices(
			[{ set: 1, chunks: plan.devices.map((devices, chunk) => ({ chunk, devices })) }],
			plan.rowsPerBlock,
			new Map()
		)
	);

	for (const temperature of plan.temperatures) {
		const blocks = measured('read', () => readBlocks(temperature));
		for (const block of blocks) {
			const result = measured('fits', () => fitSweeps(plan.biases, block));
			fitted += result.length / RESULT_WIDTH;
			for (let i = 0; i < result.length; i++) if (i % RESULT_WIDTH < 4) fits.push(result[i]!);
		}
		const distributions = measured('distributions', () =>
			distributionsOf(temperature, blocks, index)
		);
		for (const distribution of distributions) {
			means.push(distribution.mean);
			deviations.push(distribution.standardDeviation);
			lotComponents.push(distribution.components?.lot.estimate ?? Number.NaN);
			darling.push(distribution.normality?.statistic ?? Number.NaN);
		}
		for (const { method } of POLICIES) {
			const rows = measured(method, () =>
				distributions.map((distribution, i) =>
					rowOf(distribution, method, temperature, plan.biases[i] ?? 0)
				)
			);
			for (const { refusals, minimum, maximum } of rows) {
				if (refusals.length > 0) throw new Error(`${method}: ${refusals.join(' ')}`);
				limits[method]?.push(minimum?.raw ?? Number.NaN, maximum?.raw ?? Number.NaN);
			}
		}
		kept.push(...distributions);
	}
	const results = { fits, means, deviations, lotComponents, darling, ...limits };
	return { spent, fitted, kept, results };
}

const first = work();
const { kept, fitted, ...second } = work();

/** A what-if as a person meets it: one row, another confidence each time, median of many. */
const whatIf = Object.fromEntries(
	(['lots', 'normal', 'sigma'] as const).map((method) => {
		const times = kept.slice(0, 60).map((distribution) => {
			const start = performance.now();
			rowOf(distribution, method, 25, 4);
			return performance.now() - start;
		});
		return [method, times.sort((a, b) => a - b)[30] ?? Number.NaN];
	})
);

writeFileSync(
	join(folder, 'engine.json'),
	JSON.stringify({
		first: first.spent,
		spent: second.spent,
		fitMicroseconds: ((second.spent['fits'] ?? 0) * 1e6) / fitted,
		whatIf,
		results: second.results
	})
);
