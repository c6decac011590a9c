import { readFileSync, readdirSync } from 'node:fs';
import { posix } from 'node:path';

/** One import as it stands in a file. */
export interface Import {
	readonly file: string;
	/** `src/…` for our own, the package's name otherwise. */
	readonly target: string;
	readonly isOwn: boolean;
	/** `import type`: gone when the program runs. */
	readonly isTypeOnly: boolean;
}

const SPECIFIER = /(?:\b(?:import|export)\s+(type\s)?[^'"();]*?\bfrom|\bimport)\s*\(?\s*'([^']+)'/g;

/** Every source file below `src/`, tests left out. */
export function sourceFiles(): string[] {
	return readdirSync('src', { recursive: true, encoding: 'utf8' })
		.map((path) => posix.join('src', path.replaceAll('\\', '/')))
		.filter((path) => /\.(ts|svelte|mjs)$/.test(path) && !/\.test\.ts$/.test(path))
		.sort();
}

/** Our own path for a specifier, or `undefined` for a package. */
function ownPath(file: string, specifier: string): string | undefined {
	const bare = specifier.replace(/\?.*$/, '');
	if (bare.startsWith('.')) return posix.join(posix.dirname(file), bare);
	if (bare.startsWith('$lib/')) return bare.replace('$lib', 'src/lib');
	return undefined;
}

/** What a file imports, from its text; also what stands in a dynamic `import()`. */
export function importsIn(file: string, text: string): Import[] {
	return [...text.matchAll(SPECIFIER)].map(([, type, specifier = '']) => {
		const own = ownPath(file, specifier);
		return {
			file,
			target: own ?? specifier,
			isOwn: own !== undefined,
			isTypeOnly: type !== undefined
		};
	});
}

export function allImports(): Import[] {
	return sourceFiles().flatMap((file) => importsIn(file, readFileSync(file, 'utf8')));
}
