import type { DatasheetStatus } from '../../../core/datasheet/document';
import { versionText, type PublicationRecord } from '../../../core/datasheet/record';
import type { DiscBox } from './box';

export interface StatusWords {
	readonly disc: DiscBox['look'];
	readonly word: string;
	readonly addition: string;
	readonly version: string;
	readonly date: string;
}

const RELEASED = {
	production: { disc: 'full', word: 'PRODUCTION' },
	preliminary: { disc: 'half', word: 'PRELIMINARY' },
	target: { disc: 'ring', word: 'TARGET' }
} as const satisfies Record<DatasheetStatus, { disc: DiscBox['look']; word: string }>;

const PROOFS = { draft: 'DRAFT', review: 'IN REVIEW' } as const;

/** `2026-11-02 14:20 Z` of an instant. */
const proofTime = (at: string) => `${at.slice(0, 10)} ${at.slice(11, 16)} Z`;

/** What a sheet says of its own standing: mark and word, version and date. */
export function statusWords(status: DatasheetStatus, record: PublicationRecord): StatusWords {
	const version = record.version === null ? null : versionText(record.version);
	if (record.kind === 'release')
		return { ...RELEASED[status], addition: '', version: version ?? '\u2013', date: record.date };
	return {
		disc: 'dashed ring',
		word: PROOFS[record.kind],
		addition: ', not for release',
		version: version === null ? 'no version yet' : `${version} proposed`,
		date: `proof of ${proofTime(record.at)}`
	};
}
