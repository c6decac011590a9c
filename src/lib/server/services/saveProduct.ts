import { and, eq } from 'drizzle-orm';
import { productMessages } from '$lib/core/messages/products';
import { CLASS_NAMES, type ProductClass } from '$lib/core/template/template';
import { appendAudit } from '../db/appendAudit';
import type { Database } from '../db/database';
import { findCodeOwner } from '../db/findCodeOwner';
import { findDie } from '../db/findDie';
import { findDraftId } from '../db/findDraftId';
import { findPartNumberIgnoringCase } from '../db/findPartNumberIgnoringCase';
import { findProduct, type FoundProduct } from '../db/findProduct';
import { draftEdit, orderingCode, product } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';

export interface ProductFacts {
	readonly partNumber: string;
	readonly die: number;
	readonly elements: number;
	readonly productClass: ProductClass;
	readonly package: string;
	readonly description: string;
	readonly orderingCodes: readonly {
		readonly code: string;
		readonly grade: string;
		readonly marking: string;
		readonly packing: string;
		readonly quantity: number;
	}[];
}

export interface ProductToSave extends ProductFacts {
	/** Whether the part number names a product that is there already. */
	readonly isNew: boolean;
	/** The version the person opened. */
	readonly rowVersion: number;
	readonly by: string;
}

/** Where a refusal belongs: a field, or one row of the ordering codes. */
export type RefusedField = 'partNumber' | 'die' | 'productClass' | { readonly code: number } | '';

export type SaveProductOutcome =
	| { readonly status: 'saved'; readonly partNumber: string }
	| { readonly status: 'refused'; readonly field: RefusedField; readonly message: string }
	/** Somebody saved another version after this one was opened. */
	| { readonly status: 'stale'; readonly saved: FoundProduct };

const refused = (field: RefusedField, message: string): SaveProductOutcome => ({
	status: 'refused',
	field,
	message
});

/**
 * Creates or changes a product with its ordering codes. Only the version that was opened is
 * replaced. A part number never changes: addresses and released datasheets name it.
 */
export function saveProduct(
	{ db }: Pick<Stores, 'db'>,
	{ isNew, rowVersion, by, ...facts }: ProductToSave
): Promise<SaveProductOutcome> {
	const at = new Date().toISOString();
	return write(db, (tx) =>
		isNew ? create(tx, facts, { by, at }) : change(tx, facts, { by, at, rowVersion })
	);
}

async function create(
	tx: Database,
	facts: ProductFacts,
	{ by, at }: { readonly by: string; readonly at: string }
): Promise<SaveProductOutcome> {
	const taken = await findPartNumberIgnoringCase(tx, facts.partNumber);
	if (taken !== undefined) return refused('partNumber', productMessages.partNumberTaken(taken));
	const problem = await refusal(tx, facts, 0);
	if (problem) return problem;
	const { orderingCodes, ...columns } = facts;
	const [created] = await tx
		.insert(product)
		.values({ ...columns, createdAt: at })
		.returning({ id: product.id });
	if (created === undefined) throw new Error('the product was not stored');
	await writeCodes(tx, created.id, orderingCodes);
	await appendAudit(tx, {
		action: 'product.create',
		subject: facts.partNumber,
		by,
		details: { ...facts }
	});
	return { status: 'saved', partNumber: facts.partNumber };
}

async function change(
	tx: Database,
	facts: ProductFacts,
	{ by, at, rowVersion }: { readonly by: string; readonly at: string; readonly rowVersion: number }
): Promise<SaveProductOutcome> {
	const stored = await findProduct(tx, facts.partNumber);
	if (stored === undefined) return refused('', productMessages.productNotFound(facts.partNumber));
	if (stored.rowVersion !== rowVersion) return { status: 'stale', saved: stored };
	const draft = await findDraftId(tx, stored.id);
	if (draft !== undefined && stored.productClass !== facts.productClass)
		return refused('productClass', productMessages.classInUse(CLASS_NAMES[stored.productClass]));
	const problem = await refusal(tx, facts, stored.id);
	if (problem) return problem;
	const { orderingCodes, ...columns } = facts;
	await tx
		.update(product)
		.set({ ...columns, rowVersion: rowVersion + 1 })
		.where(and(eq(product.id, stored.id), eq(product.rowVersion, rowVersion)));
	await tx.delete(orderingCode).where(eq(orderingCode.product, stored.id));
	await writeCodes(tx, stored.id, orderingCodes);
	// The datasheet prints these facts: who changes them had a hand in the draft.
	if (draft !== undefined)
		await tx.insert(draftEdit).values({ draft, person: by, what: 'product', at });
	const before = {
		die: stored.die,
		elements: stored.elements,
		productClass: stored.productClass,
		package: stored.package,
		description: stored.description,
		orderingCodes: stored.orderingCodes
	};
	await appendAudit(tx, {
		action: 'product.change',
		subject: facts.partNumber,
		by,
		details: { before, after: { ...facts } }
	});
	return { status: 'saved', partNumber: facts.partNumber };
}

/** What the form alone can't know: a die that is gone, an ordering code of another product. */
async function refusal(tx: Database, facts: ProductFacts, id: number) {
	if ((await findDie(tx, facts.die)) === undefined)
		return refused('die', productMessages.dieNotFound());
	for (const [row, { code }] of facts.orderingCodes.entries()) {
		const owner = await findCodeOwner(tx, code, id);
		if (owner !== undefined) return refused({ code: row }, productMessages.codeTaken(code, owner));
	}
	return undefined;
}

async function writeCodes(
	tx: Database,
	id: number,
	codes: ProductFacts['orderingCodes']
): Promise<void> {
	if (codes.length > 0)
		await tx.insert(orderingCode).values(codes.map((code) => ({ ...code, product: id })));
}
