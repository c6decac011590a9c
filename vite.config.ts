import { sveltekit } from '@sveltejs/kit/vite';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'vitest/config';

/** Tests that call the built server; it is built first when it is not of these sources. */
const SERVED = ['tests/integration/access.test.ts', 'tests/integration/served/**/*.test.ts'];

export default defineConfig({
	plugins: [tailwindcss(), sveltekit()],
	test: {
		expect: { requireAssertions: true },
		testTimeout: 20_000,
		projects: [
			{
				extends: true,
				test: {
					name: 'unit',
					// No test changes what another one imports; a module is read once a worker, not once a file.
					isolate: false,
					include: ['src/**/*.test.ts', 'tests/**/*.test.ts'],
					exclude: SERVED
				}
			},
			{
				extends: true,
				test: {
					name: 'served',
					include: SERVED,
					globalSetup: 'tests/integration/globalSetup.ts'
				}
			}
		]
	}
});
