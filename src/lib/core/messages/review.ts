export const rolesDoNotAllow = (doing: string) => `Your roles don’t allow you to ${doing}.`;

export const mayNotVerifyOwnSubmission = () =>
	'You submitted this revision, so another person verifies and decides it.';

export const mayNotVerifyOwnEdit = () =>
	'You edited this datasheet since its last release, so another person verifies and decides it.';

export const mayNotPublishOwnApproval = () =>
	'You submitted and approved this revision, so another person publishes it.';

export const productNotFound = (partNumber: string) => `There is no product ${partNumber}.`;

export const revisionNotFound = (partNumber: string, number: number) =>
	`${partNumber} has no revision ${number}.`;

export const revisionAlreadyOpen = (number: number, state: string) =>
	`Revision ${number} is ${state}. A product has one open revision at a time: it is published or returned before the next is submitted.`;

export const nothingChangedSinceRelease = (version: string) =>
	`Nothing differs from release ${version}, so there is nothing to verify.`;

export const revisionIsNot = (number: number, event: string, state: string) =>
	`Revision ${number} is ${state} and can’t be ${event}.`;

export const rowNotFound = (row: string) => `This revision has no row ${row}.`;

export const rowsStillOpen = (open: number, flagged: number) => {
	const rows = open + flagged;
	const kinds = [
		...(open > 0 ? [`${open} open`] : []),
		...(flagged > 0 ? [`${flagged} flagged`] : [])
	].join(', ');
	return `${rows === 1 ? '1 row is' : `${rows} rows are`} not ticked (${kinds}). Approving needs every row ticked.`;
};

export const evidenceNotReady = () =>
	'The evidence is still being computed. Rows can be ticked when it is there.';

export const reasonNeeded = () => 'Say why, so that the next person can act on it.';

export const commentNeeded = () => 'Write a comment.';

export const flagNeedsComment = () => 'Say what is wrong with the row.';

export const documentDamaged = () =>
	'The stored document no longer matches its content hash. Return the revision and submit it again.';
