export const dateInThePast = (today: string) =>
	`The effective date is today (${today}, UTC) or later.`;

export const versionMoved = (shown: string, proposed: string) =>
	`The version would now be ${proposed}, not ${shown}. Look at the changes again and publish.`;

export const summaryNeeded = () => 'Say in a line what changed, for the revision history.';

export const alreadyPublishing = () => 'This revision is being published.';

export const releaseNotFound = (partNumber: string, version: string) =>
	`${partNumber} has no release ${version}.`;

export const releaseIsNot = (version: string, event: string, state: string) =>
	`Release ${version} is ${state} and can’t be ${event}.`;

export const fileNotFound = (name: string) => `This release has no file ${name}.`;

export const releaseWithdrawn = (partNumber: string, version: string) =>
	`Release ${version} of ${partNumber} was withdrawn.`;

export const fileDamaged = (name: string) =>
	`The stored ${name} no longer matches its hash, and rendering it again did not give the published bytes. It is not served.`;

export const fileOfOtherRenderer = (name: string, rendered: string, now: string) =>
	`The stored ${name} no longer matches its hash. It was rendered by ${rendered} and this server renders by ${now}, so it can’t be restored. It is not served.`;

export const publishedDocumentDamaged = () =>
	'The stored document no longer matches its content hash, so nothing was published.';

export const notApprovedAnymore = (number: number, state: string) =>
	`Revision ${number} is ${state}, so it was not published.`;

export const notInLibrary = (partNumber: string) =>
	`The library has no datasheet of ${partNumber}.`;
