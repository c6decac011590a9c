import { sql } from 'drizzle-orm';
import {
	blob,
	index,
	integer,
	primaryKey,
	real,
	sqliteTable,
	text,
	unique,
	uniqueIndex
} from 'drizzle-orm/sqlite-core';
import type { Role } from '$lib/core/review/permissions';

/*
 * Instants are ISO 8601 text in UTC, so that they sort and read the same everywhere. Json columns
 * hold what a zod schema of core describes; queries parse on the way out.
 */

// 1 · People

export const person = sqliteTable('person', {
	id: text().primaryKey(),
	email: text().notNull().unique(),
	name: text().notNull(),
	passwordHash: text().notNull(),
	isActive: integer({ mode: 'boolean' }).notNull().default(true),
	createdAt: text().notNull()
});

export const personRole = sqliteTable(
	'person_role',
	{
		person: text()
			.notNull()
			.references(() => person.id, { onDelete: 'cascade' }),
		role: text().$type<Role>().notNull()
	},
	(table) => [primaryKey({ columns: [table.person, table.role] })]
);

/** Column names and the epoch seconds are what lucia's adapter expects. */
export const session = sqliteTable(
	'session',
	{
		id: text().primaryKey(),
		userId: text('user_id')
			.notNull()
			.references(() => person.id, { onDelete: 'cascade' }),
		expiresAt: integer('expires_at').notNull()
	},
	(table) => [index('session_by_user').on(table.userId)]
);

export const apiToken = sqliteTable('api_token', {
	id: integer().primaryKey({ autoIncrement: true }),
	person: text()
		.notNull()
		.references(() => person.id, { onDelete: 'cascade' }),
	name: text().notNull(),
	/** SHA-256 of the token; the token itself is shown once and never stored. */
	hash: text().notNull().unique(),
	createdAt: text().notNull(),
	lastUsedAt: text(),
	revokedAt: text()
});

// 2 · What the organization decided, in immutable versions

export const organizationVersion = sqliteTable('organization_version', {
	number: integer().primaryKey(),
	json: text({ mode: 'json' }).notNull(),
	hash: text().notNull(),
	createdAt: text().notNull(),
	createdBy: text().references(() => person.id)
});

export const policyVersion = sqliteTable(
	'policy_version',
	{
		/** Unique over all policies; what uses a policy names this id. */
		id: integer().primaryKey({ autoIncrement: true }),
		policy: text().notNull(),
		number: integer().notNull(),
		json: text({ mode: 'json' }).notNull(),
		hash: text().notNull(),
		createdAt: text().notNull(),
		createdBy: text().references(() => person.id)
	},
	(table) => [unique().on(table.policy, table.number)]
);

export const templateVersion = sqliteTable(
	'template_version',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		template: text().notNull(),
		number: integer().notNull(),
		json: text({ mode: 'json' }).notNull(),
		hash: text().notNull(),
		createdAt: text().notNull(),
		createdBy: text().references(() => person.id)
	},
	(table) => [unique().on(table.template, table.number)]
);

// 3 · Dies, products, lots

export const die = sqliteTable('die', {
	id: integer().primaryKey({ autoIncrement: true }),
	name: text().notNull().unique(),
	/** `dieFacts` of core. */
	facts: text({ mode: 'json' }).notNull(),
	rowVersion: integer().notNull().default(1),
	createdAt: text().notNull()
});

export const product = sqliteTable('product', {
	id: integer().primaryKey({ autoIncrement: true }),
	partNumber: text().notNull().unique(),
	die: integer()
		.notNull()
		.references(() => die.id),
	elements: integer().notNull().default(1),
	productClass: text().notNull(),
	package: text().notNull(),
	description: text().notNull().default(''),
	/** The data behind the newest complete set of distributions; `null` while there is none. */
	basisHash: text(),
	rowVersion: integer().notNull().default(1),
	createdAt: text().notNull()
});

export const orderingCode = sqliteTable(
	'ordering_code',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		product: integer()
			.notNull()
			.references(() => product.id, { onDelete: 'cascade' }),
		code: text().notNull().unique(),
		grade: text().notNull(),
		marking: text().notNull(),
		packing: text().notNull(),
		quantity: integer().notNull()
	},
	(table) => [index('ordering_code_by_product').on(table.product)]
);

export const lot = sqliteTable(
	'lot',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		product: integer()
			.notNull()
			.references(() => product.id),
		name: text().notNull(),
		/** Independent lots are counted by wafer lot. */
		waferLot: text().notNull(),
		epitaxyLot: text(),
		assemblyLot: text()
	},
	(table) => [unique().on(table.product, table.name)]
);

// 4 · Uploads and measurement sets

export const upload = sqliteTable('upload', {
	id: integer().primaryKey({ autoIncrement: true }),
	product: integer()
		.notNull()
		.references(() => product.id),
	fileName: text().notNull(),
	sha256: text().notNull().unique(),
	byteSize: integer().notNull(),
	storageKey: text().notNull(),
	state: text({ enum: ['received', 'read', 'mapped', 'accepted', 'refused'] }).notNull(),
	/** `uploadPreview` of core: columns, first lines, recognised mapping, problems found so far. */
	preview: text({ mode: 'json' }),
	/** `confirmedMapping` of core: the mapping and the set-up, as the person confirmed them. */
	mapping: text({ mode: 'json' }),
	/** `uploadProblems` of core: why it was refused, how many lines, and the first of them. */
	problems: text({ mode: 'json' }),
	uploadedBy: text()
		.notNull()
		.references(() => person.id),
	uploadedAt: text().notNull()
});

export const measurementSet = sqliteTable(
	'measurement_set',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		product: integer()
			.notNull()
			.references(() => product.id),
		upload: integer()
			.notNull()
			.references(() => upload.id),
		/** `measurementSetup` of core: instrument, signal level, frequency, chuck temperature … */
		setup: text({ mode: 'json' }).notNull(),
		/** Stated systematic uncertainty U, relative (0.003 is 0.3 %). */
		uncertainty: real(),
		state: text({ enum: ['importing', 'accepted', 'superseded', 'retired'] }).notNull(),
		/** `setCounts` of core: lots, wafers, devices, sweeps, points, suspects. */
		counts: text({ mode: 'json' }),
		acceptedBy: text()
			.notNull()
			.references(() => person.id),
		acceptedAt: text().notNull()
	},
	(table) => [index('measurement_set_by_product').on(table.product)]
);

// 5 · Packed blocks: at most 2048 devices a row, one matrix a condition

export const deviceBlock = sqliteTable(
	'device_block',
	{
		set: integer()
			.notNull()
			.references(() => measurementSet.id, { onDelete: 'cascade' }),
		chunk: integer().notNull(),
		/** `deviceColumns` of core: parallel arrays lot, wafer, site, element, name. */
		devices: text({ mode: 'json' }).notNull()
	},
	(table) => [primaryKey({ columns: [table.set, table.chunk] })]
);

export const sweepBlock = sqliteTable(
	'sweep_block',
	{
		set: integer()
			.notNull()
			.references(() => measurementSet.id, { onDelete: 'cascade' }),
		quantity: text({ enum: ['capacitance', 'current'] }).notNull(),
		conditionKey: text().notNull(),
		chunk: integer().notNull(),
		gridHash: text().notNull(),
		/** The biases in volt, reverse positive, as they stand in the columns of `values`. */
		grid: text({ mode: 'json' }).$type<number[]>().notNull(),
		/** One unit of the stored numbers in SI: 1e-12 for a file in pF. */
		unitScale: real().notNull(),
		/** Float64 little endian, devices × biases, row by row; NaN = absent. */
		values: blob({ mode: 'buffer' }).notNull()
	},
	(table) => [
		primaryKey({
			columns: [table.set, table.quantity, table.conditionKey, table.gridHash, table.chunk]
		})
	]
);

/** Scalar readings: one value a device, with what the value says of it. */
export const readingBlock = sqliteTable(
	'reading_block',
	{
		set: integer()
			.notNull()
			.references(() => measurementSet.id, { onDelete: 'cascade' }),
		/** Key of the catalogue of core: `I_R`. */
		characteristic: text().notNull(),
		conditionKey: text().notNull(),
		/** 0 for the first reading of a device, 1 for its second … */
		repeat: integer().notNull(),
		chunk: integer().notNull(),
		/** One unit of the stored numbers in SI: 1e-9 for a file in nA. */
		unitScale: real().notNull(),
		/** Float64 little endian, one a device; NaN = absent. */
		values: blob({ mode: 'buffer' }).notNull(),
		/** One signed byte a device: at most (−1), exactly (0), at least (1). */
		censored: blob({ mode: 'buffer' }).notNull()
	},
	(table) => [
		primaryKey({
			columns: [table.set, table.characteristic, table.conditionKey, table.repeat, table.chunk]
		})
	]
);

// 6 · Quarantine and verdicts

/**
 * Devices the suspect rule found at import; a verdict decides what becomes of them. What is suspect
 * is keyed by `measuredKey` of core: a capacitance sweep by its condition alone, others with what
 * was measured before it.
 */
export const suspect = sqliteTable(
	'suspect',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		set: integer()
			.notNull()
			.references(() => measurementSet.id, { onDelete: 'cascade' }),
		/** Index over the set: chunk × 2048 + row. */
		device: integer().notNull(),
		conditionKey: text().notNull(),
		/** `suspectReason` of core. */
		reason: text({ mode: 'json' }).notNull()
	},
	(table) => [index('suspect_by_set').on(table.set)]
);

/** Append-only: the newest verdict on a device and condition holds. */
export const verdict = sqliteTable(
	'verdict',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		set: integer()
			.notNull()
			.references(() => measurementSet.id),
		device: integer().notNull(),
		conditionKey: text().notNull(),
		decision: text({ enum: ['keep', 'exclude'] }).notNull(),
		reason: text().notNull(),
		by: text()
			.notNull()
			.references(() => person.id),
		at: text().notNull()
	},
	(table) => [index('verdict_by_set').on(table.set)]
);

// 7 · Distributions and limits

export const distribution = sqliteTable(
	'distribution',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		product: integer()
			.notNull()
			.references(() => product.id),
		characteristic: text().notNull(),
		/** `conditionKey` of core, with the bias. */
		conditionKey: text().notNull(),
		/** Hash of the sets and verdicts behind it. */
		basisHash: text().notNull(),
		/** `distributionSummary` of core, without its groups. */
		summary: text({ mode: 'json' }).notNull(),
		/** Per lot and wafer n, mean and sum of squares, and the outermost devices: `packGroups`. */
		groups: blob({ mode: 'buffer' }).notNull()
	},
	(table) => [
		uniqueIndex('distribution_once').on(
			table.product,
			table.characteristic,
			table.conditionKey,
			table.basisHash
		)
	]
);

/** How the measured biases of a temperature and frequency vary together. */
export const jointDistribution = sqliteTable(
	'joint_distribution',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		product: integer()
			.notNull()
			.references(() => product.id),
		characteristic: text().notNull(),
		/** `conditionKey` of core, without a bias. */
		conditionKey: text().notNull(),
		/** Hash of the sets and verdicts behind it. */
		basisHash: text().notNull(),
		/** Lot means and covariance within lots, packed by `packJoint` of core. */
		joint: blob({ mode: 'buffer' }).notNull()
	},
	(table) => [
		uniqueIndex('joint_distribution_once').on(
			table.product,
			table.characteristic,
			table.conditionKey,
			table.basisHash
		)
	]
);

/** The fitted laws of all devices at one temperature and frequency, summed up. */
export const sweepFit = sqliteTable(
	'sweep_fit',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		product: integer()
			.notNull()
			.references(() => product.id),
		/** `conditionKey` of core, without a bias. */
		conditionKey: text().notNull(),
		/** Hash of the sets and verdicts behind it. */
		basisHash: text().notNull(),
		/** `sweepFits` of core. */
		fits: text({ mode: 'json' }).notNull()
	},
	(table) => [uniqueIndex('sweep_fit_once').on(table.product, table.conditionKey, table.basisHash)]
);

/**
 * Distributions somebody entered because only their summary exists. Append-only: the newest of a
 * condition holds, and only where nothing is measured.
 */
export const enteredDistribution = sqliteTable(
	'entered_distribution',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		product: integer()
			.notNull()
			.references(() => product.id),
		characteristic: text().notNull(),
		/** `conditionKey` of core, with the bias. */
		conditionKey: text().notNull(),
		/** `enteredValues` of core: n, mean and deviation of transformed values. */
		entered: text({ mode: 'json' }).notNull(),
		reason: text().notNull(),
		/** Where the summary comes from, in words. */
		source: text().notNull(),
		by: text()
			.notNull()
			.references(() => person.id),
		at: text().notNull()
	},
	(table) => [index('entered_distribution_by_product').on(table.product, table.characteristic)]
);

/** By how much limits at each bias are widened to hold along the curve: simulated, and kept. */
export const curveWidening = sqliteTable('curve_widening', {
	/** Hash of the covariances, the promise and the engine. */
	inputHash: text().primaryKey(),
	/** `curveWidening` of core. */
	result: text({ mode: 'json' }).notNull()
});

/** A computed limit, kept under everything it depends on. */
export const limitMemo = sqliteTable(
	'limit_memo',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		inputHash: text().notNull(),
		policyVersion: integer()
			.notNull()
			.references(() => policyVersion.id),
		engineVersion: text().notNull(),
		/** `limitRow` of core, with its derivation. */
		result: text({ mode: 'json' }).notNull()
	},
	(table) => [
		uniqueIndex('limit_memo_once').on(table.inputHash, table.policyVersion, table.engineVersion)
	]
);

/** A printed limit that a person decided; append-only, and the newest of a condition, policy and basis stands. */
export const limitOverride = sqliteTable(
	'limit_override',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		product: integer()
			.notNull()
			.references(() => product.id),
		characteristic: text().notNull(),
		conditionKey: text().notNull(),
		policyVersion: integer()
			.notNull()
			.references(() => policyVersion.id),
		basis: text().notNull(),
		/** `limitDecision` of core; null where an override was taken back. */
		decision: text({ mode: 'json' }),
		reason: text().notNull(),
		by: text()
			.notNull()
			.references(() => person.id),
		at: text().notNull()
	},
	(table) => [index('limit_override_of').on(table.product, table.characteristic)]
);

// 8 · The one editable draft of a product

export const draft = sqliteTable('draft', {
	id: integer().primaryKey({ autoIncrement: true }),
	product: integer()
		.notNull()
		.unique()
		.references(() => product.id),
	templateVersion: integer()
		.notNull()
		.references(() => templateVersion.id),
	status: text({ enum: ['target', 'preliminary', 'production'] }).notNull(),
	/** The limit policy new bindings take. */
	policyVersion: integer()
		.notNull()
		.references(() => policyVersion.id),
	rowVersion: integer().notNull().default(1),
	createdAt: text().notNull()
});

export const draftSlot = sqliteTable(
	'draft_slot',
	{
		draft: integer()
			.notNull()
			.references(() => draft.id, { onDelete: 'cascade' }),
		slot: text().notNull(),
		/** `binding` of core. */
		binding: text({ mode: 'json' }).notNull(),
		rowVersion: integer().notNull().default(1)
	},
	(table) => [primaryKey({ columns: [table.draft, table.slot] })]
);

export const draftText = sqliteTable(
	'draft_text',
	{
		draft: integer()
			.notNull()
			.references(() => draft.id, { onDelete: 'cascade' }),
		block: text().notNull(),
		text: text().notNull(),
		rowVersion: integer().notNull().default(1)
	},
	(table) => [primaryKey({ columns: [table.draft, table.block] })]
);

/** Who touched what since when: whoever edited a draft can't approve what comes of it. */
export const draftEdit = sqliteTable(
	'draft_edit',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		draft: integer()
			.notNull()
			.references(() => draft.id, { onDelete: 'cascade' }),
		person: text()
			.notNull()
			.references(() => person.id),
		what: text().notNull(),
		at: text().notNull()
	},
	(table) => [index('draft_edit_by_draft').on(table.draft)]
);

// 9 · Revisions and their review

export const revision = sqliteTable(
	'revision',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		product: integer()
			.notNull()
			.references(() => product.id),
		/** Counts from 1 within the product. */
		number: integer().notNull(),
		/** Canonical bytes of the `datasheetDocument` (RFC 8785): the truth, never serialized again. */
		document: blob({ mode: 'buffer' }).notNull(),
		sha256: text().notNull(),
		state: text({ enum: ['inReview', 'approved', 'published', 'returned'] }).notNull(),
		submittedBy: text()
			.notNull()
			.references(() => person.id),
		submittedAt: text().notNull(),
		/** Ids of everybody who edited the draft since the last release. */
		editors: text({ mode: 'json' }).$type<string[]>().notNull()
	},
	(table) => [
		unique().on(table.product, table.number),
		uniqueIndex('one_open_revision')
			.on(table.product)
			.where(sql`state in ('inReview', 'approved')`)
	]
);

export const verificationRow = sqliteTable(
	'verification_row',
	{
		revision: integer()
			.notNull()
			.references(() => revision.id, { onDelete: 'cascade' }),
		/** The row's id within the document. */
		row: text().notNull(),
		position: integer().notNull(),
		/** `verificationEvidence` of core: second route, devices outside, range of each lot, risk. */
		evidence: text({ mode: 'json' }).notNull(),
		state: text({ enum: ['open', 'ticked', 'flagged'] }).notNull(),
		by: text().references(() => person.id),
		at: text()
	},
	(table) => [primaryKey({ columns: [table.revision, table.row] })]
);

export const comment = sqliteTable('comment', {
	id: integer().primaryKey({ autoIncrement: true }),
	revision: integer()
		.notNull()
		.references(() => revision.id, { onDelete: 'cascade' }),
	/** The row it speaks of; `null` for the revision as a whole. */
	row: text(),
	text: text().notNull(),
	by: text()
		.notNull()
		.references(() => person.id),
	at: text().notNull()
});

export const decision = sqliteTable('decision', {
	id: integer().primaryKey({ autoIncrement: true }),
	revision: integer()
		.notNull()
		.references(() => revision.id, { onDelete: 'cascade' }),
	event: text({
		enum: ['submit', 'approve', 'return', 'publish', 'withdraw', 'reinstate']
	}).notNull(),
	reason: text().notNull().default(''),
	by: text()
		.notNull()
		.references(() => person.id),
	at: text().notNull()
});

// 10 · Releases

export const release = sqliteTable(
	'release',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		product: integer()
			.notNull()
			.references(() => product.id),
		major: integer().notNull(),
		minor: integer().notNull(),
		revision: integer()
			.notNull()
			.unique()
			.references(() => revision.id),
		/** The release this one replaces. */
		previous: integer(),
		/** `publicationRecord` of core. */
		record: text({ mode: 'json' }).notNull(),
		rendererVersion: text().notNull(),
		state: text({ enum: ['scheduled', 'current', 'superseded', 'withdrawn'] }).notNull(),
		effectiveFrom: text().notNull(),
		publishedBy: text()
			.notNull()
			.references(() => person.id),
		publishedAt: text().notNull()
	},
	(table) => [unique().on(table.product, table.major, table.minor)]
);

export const releaseFile = sqliteTable(
	'release_file',
	{
		release: integer()
			.notNull()
			.references(() => release.id),
		name: text().notNull(),
		mediaType: text().notNull(),
		sha256: text().notNull(),
		byteSize: integer().notNull(),
		storageKey: text().notNull()
	},
	(table) => [primaryKey({ columns: [table.release, table.name] })]
);

/** What the data of today makes of a published release: one row a release, written anew. */
export const releaseAssessment = sqliteTable('release_assessment', {
	release: integer()
		.primaryKey()
		.references(() => release.id, { onDelete: 'cascade' }),
	/** Hash of the sets and verdicts it was judged by. */
	basisHash: text().notNull(),
	/** `assessedRows` of core: what no longer holds, each with its state and sentence. */
	rows: text({ mode: 'json' }).notNull(),
	at: text().notNull()
});

// 11 · Work and records

export const job = sqliteTable(
	'job',
	{
		id: integer().primaryKey({ autoIncrement: true }),
		kind: text().notNull(),
		payload: text({ mode: 'json' }).notNull(),
		/** A job with the same key that has not ended stands for this one. */
		dedupeKey: text().notNull(),
		state: text({ enum: ['queued', 'running', 'done', 'failed'] }).notNull(),
		/** The fence: a worker may write only while its attempt is the newest. */
		attempt: integer().notNull().default(0),
		leaseUntil: text(),
		/** `jobProgress` of core: { done, total, words }. */
		progress: text({ mode: 'json' }),
		result: text({ mode: 'json' }),
		/** What a person may read of a failure. */
		error: text(),
		createdBy: text().references(() => person.id),
		createdAt: text().notNull(),
		endedAt: text()
	},
	(table) => [
		index('job_by_state').on(table.state),
		uniqueIndex('one_job_a_key')
			.on(table.dedupeKey)
			.where(sql`state in ('queued', 'running')`)
	]
);

export const audit = sqliteTable('audit', {
	seq: integer().primaryKey({ autoIncrement: true }),
	/** Unique, so that two writers can't fork the chain. */
	prevHash: text().notNull().unique(),
	hash: text().notNull().unique(),
	at: text().notNull(),
	/** The person, or `null` for what the server did by itself. */
	by: text().references(() => person.id),
	action: text().notNull(),
	subject: text().notNull(),
	details: text({ mode: 'json' }).notNull()
});
