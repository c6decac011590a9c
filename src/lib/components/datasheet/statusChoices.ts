import type { DatasheetStatus } from '$lib/core/datasheet/document';

/** What each status asks and promises, as a person chooses it. */
export const STATUS_CHOICES: readonly { value: DatasheetStatus; label: string }[] = [
	{ value: 'target', label: 'target: no data needed, every number is an aim' },
	{ value: 'preliminary', label: 'preliminary: one lot is enough, limits are provisional' },
	{ value: 'production', label: 'production: all rules apply' }
];
