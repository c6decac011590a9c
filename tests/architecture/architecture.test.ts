import { expect, test } from 'vitest';
import { allImports, importsIn, sourceFiles } from './imports';
import type { Import } from './imports';
import { CORE_ORDER, LAYERS, NOBODY } from './layers';

const layerOf = (file: string) =>
	Object.keys(LAYERS).find((name) => LAYERS[name]?.files.test(file));

const isTypesOfKit = ({ target }: Import) => /\/\$types(\.js)?$/.test(target);

/** A route may import what stands in its own route. */
const isOwnRoute = ({ file, target }: Import) =>
	file.startsWith('src/routes/') && target.startsWith(file.replace(/\/[^/]*$/, '/'));

function isAllowed(entry: Import): boolean {
	const layer = LAYERS[layerOf(entry.file) ?? ''];
	if (layer === undefined) return false;
	if (isTypesOfKit(entry)) return true;
	if (!entry.isOwn) return layer.packages.test(entry.target);
	if (NOBODY.test(entry.target)) return isOwnRoute(entry);
	return layer.own.test(entry.target);
}

const said = ({ file, target }: Import) => `${file} imports ${target}`;

/** Sentences name what every part speaks of: `messages` has no place in the order. */
const coreFolder = (path: string) => /^src\/lib\/core\/(?!messages\/)([^/]+)\//.exec(path)?.[1];
const coreRank = (path: string) => CORE_ORDER.findIndex((folder) => folder === coreFolder(path));

test('every source file belongs to a layer', () => {
	expect(sourceFiles().filter((file) => layerOf(file) === undefined)).toEqual([]);
});

test('every layer imports only what the allow-list gives it', () => {
	expect(
		allImports()
			.filter((entry) => !isAllowed(entry))
			.map(said)
	).toEqual([]);
});

test('core is imported in its own order, never backwards', () => {
	const backwards = allImports().filter(
		({ file, target }) =>
			coreFolder(file) && coreFolder(target) && coreRank(target) > coreRank(file)
	);
	expect(backwards.map(said)).toEqual([]);
	const unranked = sourceFiles().filter((file) => coreFolder(file) && coreRank(file) < 0);
	expect(unranked).toEqual([]);
});

test('what the worker imports uses nothing of the framework', () => {
	const strays = allImports().filter(
		({ file, target }) =>
			/^src\/lib\/(core|plot|server)\//.test(file) && /^\$(env|app)\//.test(target)
	);
	expect(strays.map(said)).toEqual([]);
});

test('no file imports itself by a round trip', () => {
	expect(roundTrips()).toEqual([]);
});

test.each([
	['src/lib/core/units/planted.ts', "import { x } from '../limits/limit';", 'core order'],
	['src/lib/core/limits/planted.ts', "import { readFile } from 'node:fs';", 'layer'],
	['src/lib/plot/planted.ts', "import { write } from '$lib/server/db/write';", 'layer'],
	[
		'src/lib/server/services/planted.ts',
		"import { load } from '../../../routes/+page.server';",
		'layer'
	]
])('a planted stray in %s is found', (file, text, kind) => {
	const [entry] = importsIn(file, text);
	if (entry === undefined) throw new Error('the planted import was not read');
	const isFound =
		kind === 'layer' ? !isAllowed(entry) : coreRank(entry.target) > coreRank(entry.file);
	expect(isFound).toBe(true);
});

/** Files that reach themselves through their imports; types alone don't count. */
function roundTrips(): string[] {
	const files = new Set(sourceFiles());
	const resolved = (target: string) =>
		[target, `${target}.ts`, target.replace(/\.js$/, '.ts')].find((path) => files.has(path));
	const edges = new Map<string, string[]>();
	for (const { file, target, isOwn, isTypeOnly } of allImports()) {
		const to = isOwn && !isTypeOnly ? resolved(target) : undefined;
		if (to !== undefined) edges.set(file, [...(edges.get(file) ?? []), to]);
	}
	const done = new Set<string>();
	const found: string[] = [];
	const visit = (file: string, path: readonly string[]) => {
		if (path.includes(file)) found.push([...path.slice(path.indexOf(file)), file].join(' → '));
		if (done.has(file) || path.includes(file)) return;
		for (const next of edges.get(file) ?? []) visit(next, [...path, file]);
		done.add(file);
	};
	for (const file of files) visit(file, []);
	return found;
}
