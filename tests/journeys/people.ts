import { test as base } from '@playwright/test';
import type { Browser, Page } from '@playwright/test';
import { ORIGIN_VARIABLE } from './setup';

export const PEOPLE = {
	product: 'product@larkmoor.test',
	applications: 'applications@larkmoor.test',
	marketing: 'marketing@larkmoor.test',
	administrator: 'admin@larkmoor.test',
	reader: 'reader@larkmoor.test'
} as const;
export type Somebody = keyof typeof PEOPLE;

/** The address the suite's server answers at. */
export function origin(): string {
	const address = process.env[ORIGIN_VARIABLE];
	if (address === undefined) throw new Error('the suite has no server; see setup.ts');
	return address;
}

/** Waits until the page's scripts are at work; never for an idle network. */
export async function hydrated(page: Page): Promise<void> {
	await page.locator('html[data-hydrated]').waitFor({ state: 'attached' });
}

type StoredState = Awaited<ReturnType<Awaited<ReturnType<Browser['newContext']>>['storageState']>>;

/** Signs in once a person and worker; later pages start from the stored session. */
export const test = base.extend<
	{ visitAs: (somebody: Somebody | 'nobody') => Promise<Page> },
	{ sessions: Map<Somebody, StoredState> }
>({
	sessions: [
		// eslint-disable-next-line no-empty-pattern -- Playwright reads the pattern
		async ({}, use) => use(new Map()),
		{ scope: 'worker' }
	],
	visitAs: async ({ browser, sessions }, use) => {
		const opened: Page[] = [];
		await use(async (somebody) => {
			const stored = somebody === 'nobody' ? undefined : sessions.get(somebody);
			const context = await browser.newContext({
				baseURL: origin(),
				colorScheme: 'light',
				viewport: { width: 1280, height: 900 },
				acceptDownloads: true,
				...(stored === undefined ? {} : { storageState: stored })
			});
			const page = await context.newPage();
			opened.push(page);
			if (stored === undefined && somebody !== 'nobody') {
				await signIn(page, PEOPLE[somebody]);
				sessions.set(somebody, await context.storageState());
			}
			return page;
		});
		await Promise.all(opened.map((page) => page.context().close()));
	}
});

/** The demo's people all have the password that the sign-in page states. */
async function signIn(page: Page, email: string): Promise<void> {
	await page.goto('/sign-in');
	await page
		.locator('form', { has: page.locator(`[value="${email}"]`) })
		.getByRole('button')
		.click();
	await page.waitForURL('**/worklist');
}
