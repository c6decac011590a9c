import type { Change } from './change';
import type { DatasheetStatus } from './document';

export interface Version {
	readonly major: number;
	readonly minor: number;
}

/** What a reader has to know before designing with the new version: these count as major. */
const MAJOR_AREAS: ReadonlySet<Change['area']> = new Set([
	'guarantee',
	'condition',
	'basis',
	'rating'
]);

export function compareVersions(a: Version, b: Version): number {
	return a.major - b.major || a.minor - b.minor;
}

/** The highest version ever used, withdrawn ones included, or `undefined`. */
export function highestVersion(versions: readonly Version[]): Version | undefined {
	return versions.toSorted(compareVersions).at(-1);
}

/**
 * The version a release gets. Production counts from 1.0: major when a guarantee, condition, basis
 * or rating changes, minor for typical values and text. Target and preliminary datasheets promise
 * nothing for good and count 0.1, 0.2 … until the first production release. A number once used is
 * never used again, whatever became of its release.
 */
export function nextVersion(
	used: readonly Version[],
	status: DatasheetStatus,
	changes: readonly Change[]
): Version {
	const highest = highestVersion(used) ?? { major: 0, minor: 0 };
	if (highest.major === 0)
		return status === 'production'
			? { major: 1, minor: 0 }
			: { major: 0, minor: highest.minor + 1 };

	const isMajor = changes.some(({ area }) => MAJOR_AREAS.has(area));
	return isMajor
		? { major: highest.major + 1, minor: 0 }
		: { major: highest.major, minor: highest.minor + 1 };
}
