import { defineConfig } from '@playwright/test';

/**
 * Browser stories on the production build, in Debian's Chromium. Files run beside each other, the
 * stories of a file one after the other. A trace of a failure is kept with TRACE=1: it takes a third
 * of the time.
 */
export default defineConfig({
	testDir: './journeys',
	testMatch: '**/*.journey.ts',
	outputDir: '../test-results',
	workers: 2,
	fullyParallel: false,
	forbidOnly: true,
	retries: 0,
	timeout: 90_000,
	expect: { timeout: 15_000 },
	globalSetup: './journeys/setup.ts',
	reporter: [['line'], ['json', { outputFile: '.work/playwright.json' }]],
	use: {
		trace: process.env['TRACE'] === '1' ? 'retain-on-failure' : 'off',
		actionTimeout: 15_000,
		navigationTimeout: 30_000,
		launchOptions: {
			executablePath: '/usr/bin/chromium',
			args: [
				'--no-sandbox',
				'--disable-gpu',
				'--disable-quic',
				'--no-first-run',
				'--disable-background-networking',
				'--disable-component-update',
				'--disable-sync'
			]
		}
	}
});
