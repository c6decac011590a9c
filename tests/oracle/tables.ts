import { readFileSync } from 'node:fs';
import { groupSums } from '../../src/lib/core/stats/groupSums';
import type { GroupSums } from '../../src/lib/core/stats/varianceComponents';

type Line = Readonly<Record<string, string>>;

/** A stored data set, line by line. */
export function tableOf(file: string): Line[] {
	const text = readFileSync(new URL(`data/${file}`, import.meta.url), 'utf8');
	const [head = '', ...lines] = text.trim().split(/\r?\n/);
	const names = head.split(',');
	return lines.map((line) => {
		const cells = line.split(',');
		return Object.fromEntries(names.map((name, i) => [name, cells[i] ?? '']));
	});
}

export const columnOf = (file: string, name: string): number[] =>
	tableOf(file).map((line) => Number(line[name]));

/** Values of a column grouped by another, in order of appearance. */
export function groupsOf(lines: readonly Line[], by: string, value: string): number[][] {
	const groups = new Map<string, number[]>();
	for (const line of lines) {
		const key = line[by] ?? '';
		const group = groups.get(key) ?? [];
		group.push(Number(line[value]));
		groups.set(key, group);
	}
	return [...groups.values()];
}

/** How the stored data sets are nested: top level, level below, value. */
const LAYOUT: Readonly<Record<string, readonly [string, string, string]>> = {
	'oxide.csv': ['Lot', 'Wafer', 'Thickness'],
	'pastes.csv': ['batch', 'cask', 'strength'],
	'nist_machines.csv': ['machine', 'operator', 'y']
};

/** Sums per lot and wafer of a nested data set. */
export function nestedSums(
	file: string,
	transform: (value: number) => number = (value) => value,
	keep: (line: Line) => boolean = () => true
): GroupSums[][] {
	const layout = LAYOUT[file];
	if (layout === undefined) throw new Error(`no layout for ${file}`);
	const [top, middle, value] = layout;
	const lots = new Map<string, Line[]>();
	for (const line of tableOf(file).filter(keep)) {
		const key = line[top] ?? '';
		lots.set(key, [...(lots.get(key) ?? []), line]);
	}
	return [...lots.values()].map((lines) =>
		groupsOf(lines, middle, value).map((group) => groupSums(group.map(transform)))
	);
}

const ONE_WAY: Readonly<Record<string, readonly [string, string]>> = {
	'dyestuff.csv': ['Batch', 'Yield'],
	'dyestuff2.csv': ['Batch', 'Yield'],
	'nist_sirstv.csv': ['instrument', 'resistance'],
	'cmh17_etw2.csv': ['batch', 'strength'],
	'km41.csv': ['batch', 'y']
};

/** Values per group of a one-way data set. */
export function oneWayGroups(file: string): number[][] {
	const layout = ONE_WAY[file];
	if (layout === undefined) throw new Error(`no layout for ${file}`);
	return groupsOf(tableOf(file), ...layout);
}

/** Currents of the ten wafers at one voltage. */
export function waferGroups(voltage: number, transform: (value: number) => number): number[][] {
	const lines = tableOf('wafer.csv').filter((line) => Number(line['voltage']) === voltage);
	return groupsOf(lines, 'Wafer', 'current').map((group) => group.map(transform));
}
