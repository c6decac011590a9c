import { expect, it } from 'vitest';
import { entriesIn } from './entries';

const names = (file: string, text: string) => entriesIn(file, text).map(({ name }) => name);

it('reads loads and named actions of a page, without its groups', () => {
	const text = `
		export const load = () => ({});
		export const actions: Actions = { save: async () => {}, 'take-back': async () => {}, async drop() {} };`;
	expect(names('/src/routes/(app)/parts/[part]/+page.server.ts', text)).toEqual([
		'/parts/[part] load',
		'/parts/[part] action save',
		'/parts/[part] action take-back',
		'/parts/[part] action drop'
	]);
});

it('reads methods however they are exported, and nothing else', () => {
	const text = `
		export const GET = () => {};
		export async function POST() {}
		const remove = () => {};
		export { remove as DELETE };
		export const prerender = false;`;
	expect(names('/src/routes/api/+server.ts', text)).toEqual([
		'/api GET',
		'/api POST',
		'/api DELETE'
	]);
});

it('keeps the group in the name of a layout', () => {
	const text = 'export const load = () => ({});';
	expect(names('/src/routes/(app)/+layout.server.ts', text)).toEqual(['/(app) layout load']);
	expect(names('/src/routes/+layout.server.ts', text)).toEqual(['/ layout load']);
});

it.each([
	['export const actions = others;'],
	['export const actions = { ...others };'],
	['export const actions = { [name]: () => {} };']
])('refuses actions it cannot enumerate: %s', (text) => {
	expect(() => entriesIn('/src/routes/x/+page.server.ts', text)).toThrow(/can't be enumerated/);
});
