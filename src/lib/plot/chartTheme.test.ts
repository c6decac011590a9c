import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { screenTheme } from './chartTheme';

/** The tokens of one scheme, from the style sheet that the pages use. */
function tokens(scheme: 'light' | 'dark'): Record<string, string> {
	const css = readFileSync('src/app.css', 'utf8');
	const blocks = [...css.matchAll(/\{([^{}]*--paper:[^{}]*)\}/g)].map(([, block = '']) => block);
	const block = scheme === 'light' ? blocks[0] : blocks[1];
	return Object.fromEntries(
		[...(block ?? '').matchAll(/--([a-z-]+):\s*(#[0-9a-f]+)/gi)].map(
			([, name = '', value = '']) => [name, value.toLowerCase()]
		)
	);
}

it.each(['light', 'dark'] as const)('a chart has the inks of the %s pages', (scheme) => {
	const of = tokens(scheme);
	const theme = screenTheme(scheme, { width: 1, height: 1 });
	expect([theme.paper, theme.ink, theme.inkSoft, theme.band]).toEqual([
		of['sheet'],
		of['ink'],
		of['ink-soft'],
		of['band']
	]);
	expect([theme.typical.color, theme.outside.color, theme.grid.color, theme.sweep.color]).toEqual([
		of['cobalt'],
		of['vermilion'],
		of['rule'],
		of['sweep']
	]);
});
