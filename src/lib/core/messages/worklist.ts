const count = (size: number, one: string, many = `${one}s`) => `${size} ${size === 1 ? one : many}`;

export const worklistMessages = {
	summary: (things: number, oldest: string) =>
		things === 1
			? `1 thing waits for you, since ${oldest}.`
			: `${things} things wait for you. The oldest came on ${oldest}.`,
	nothing: () => 'Nothing waits for you.',
	/** What can stand in the worklist of somebody who may do these things. */
	expected: (may: {
		readonly giveVerdicts: boolean;
		readonly verify: boolean;
		readonly publish: boolean;
	}): string[] => [
		...(may.giveVerdicts
			? [
					'Published limits that newer data contradicts or no longer supports.',
					'Devices in quarantine, files to map, and revisions that come back to you.'
				]
			: []),
		...(may.verify ? ['Revisions to verify, except those you had a hand in.'] : []),
		...(may.publish ? ['Approved revisions, to publish.'] : []),
		'Work of yours that failed.'
	],

	devices: (size: number) => count(size, 'device'),
	files: (size: number) => count(size, 'file'),
	revisions: (size: number) => count(size, 'revision'),
	jobs: (size: number) => count(size, 'job'),

	quarantined: (devices: number, set: number) =>
		`${count(devices, 'device')} of measurement set ${set} ${devices === 1 ? 'waits' : 'wait'} for a verdict.`,
	quarantinedNote: () =>
		'Left out of the distributions until somebody keeps or excludes them. The rest of the set is in use.',
	toMap: (fileName: string) => `${fileName} is read and waits for its mapping.`,
	toMapNote: (name: string) => `Uploaded by ${name}. Nothing of it is in use yet.`,
	returned: (number: number, name: string, comments: number) =>
		`Revision ${number}, returned by ${name}${comments === 0 ? '' : ` with ${count(comments, 'comment')}`}.`,
	toVerify: (number: number, name: string) => `Revision ${number}, submitted by ${name}.`,
	toVerifyNote: (ticked: number, flagged: number, rows: number) =>
		`${ticked} of ${count(rows, 'row')} verified${flagged === 0 ? '' : `, ${flagged} flagged`}.`,
	toPublish: (number: number, name: string) => `Revision ${number}, approved by ${name}.`,
	toPublishNote: (name: string) => `Submitted by ${name}. Publishing gives it a version and a day.`,
	limits: (size: number) => count(size, 'limit'),
	contradicted: (version: string, limits: number) =>
		`Version ${version}: newer devices contradict ${count(limits, 'published limit')}.`,
	unsupported: (version: string, limits: number) =>
		`Version ${version}: newer data no longer supports ${count(limits, 'published limit')}.`,
	failed: (what: string) => `${what} did not finish.`
};

/** What a job does, for people; the kinds of `server/work/handlers.ts`. */
const JOB_NAMES: Readonly<Record<string, string>> = {
	'read-upload': 'Reading a file',
	'import-measurement-set': 'Importing a measurement set',
	'compute-distributions': 'Computing the distributions',
	'fit-sweeps': 'Fitting the sweeps of each device',
	'assess-releases': 'Comparing published limits with newer data',
	'simulate-widening': 'Simulating the factor for a whole curve',
	'render-proof': 'Drawing a proof',
	'verify-evidence': 'Gathering the evidence of a revision',
	'publish-release': 'Publishing a release'
};

export const jobName = (kind: string) => JOB_NAMES[kind] ?? `The job ${kind}`;
