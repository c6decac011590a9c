/** Under which the publishing of a revision is one job. */
export const publishKey = (revision: number) => `publish-release:${revision}`;
