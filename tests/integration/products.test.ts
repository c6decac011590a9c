import { asc, eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { MATERIAL_PRESETS } from '$lib/core/junction/material';
import { productMessages as say } from '$lib/core/messages/products';
import type { OpenDatabase } from '$lib/server/db/client';
import { findDie } from '$lib/server/db/findDie';
import { findProduct } from '$lib/server/db/findProduct';
import { listEditors } from '$lib/server/db/listEditors';
import {
	audit,
	draft,
	lot,
	orderingCode,
	policyVersion,
	templateVersion
} from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { ensureDefaults } from '$lib/server/services/ensureDefaults';
import { describeProduct } from '$lib/server/services/productSummary';
import { listProductRows } from '$lib/server/services/productTable';
import { saveDie } from '$lib/server/services/saveDie';
import { saveProduct, type ProductToSave } from '$lib/server/services/saveProduct';
import { insertReviewPeople } from '../factories/reviewPeople';
import { openTestDatabase } from '../factories/testDatabase';

const IDA = 'ida';
const AT = '2026-11-28T09:00:00.000Z';
const facts = {
	area: 4.2e-8,
	material: MATERIAL_PRESETS.si,
	conductivity: 'n',
	junction: 'p-n'
} as const;

let database: OpenDatabase;
let stores: Pick<OpenDatabase, 'db'>;
let die: number;

const code = (name: string, quantity = 3000) => ({
	code: name,
	grade: 'standard',
	marking: 'K1',
	packing: 'tape',
	quantity
});

const tuning = (given: Partial<ProductToSave> = {}): ProductToSave => ({
	isNew: true,
	rowVersion: 0,
	by: IDA,
	partNumber: 'LKT-1130',
	die,
	elements: 1,
	productClass: 'tuning',
	package: 'SOD-323',
	description: 'Hyperabrupt tuning diode',
	orderingCodes: [code('LKT-1130-T'), code('LKT-1130-R', 10_000)],
	...given
});

const auditTrail = () =>
	stores.db
		.select({ action: audit.action, subject: audit.subject, by: audit.by })
		.from(audit)
		.where(eq(audit.by, IDA))
		.orderBy(asc(audit.seq));

beforeEach(async () => {
	database = await openTestDatabase();
	stores = { db: database.db };
	await insertReviewPeople(database.db);
	const saved = await saveDie(stores, { id: null, rowVersion: 0, name: 'T-12', facts, by: IDA });
	if (saved.status !== 'saved') throw new Error('the die was not saved');
	die = saved.id;
});
afterEach(() => database.close());

describe('a die', () => {
	it('is stored with its facts and recorded', async () => {
		expect(await findDie(stores.db, die)).toMatchObject({ name: 'T-12', facts, rowVersion: 1 });
		expect(await auditTrail()).toEqual([{ action: 'die.create', subject: 'die T-12', by: IDA }]);
	});

	it('is refused a name that another has, however it is written', async () => {
		expect(
			await saveDie(stores, { id: null, rowVersion: 0, name: 't-12', facts, by: IDA })
		).toEqual({ status: 'refused', field: 'name', message: say.dieNameTaken('T-12') });
	});

	it('keeps its own name when it changes, and counts its version', async () => {
		const changed = { ...facts, area: 5e-8 };
		await saveDie(stores, { id: die, rowVersion: 1, name: 'T-12', facts: changed, by: IDA });
		expect(await findDie(stores.db, die)).toMatchObject({ facts: changed, rowVersion: 2 });
	});

	it('tells a second editor what was saved meanwhile, and changes nothing', async () => {
		const first = { ...facts, area: 5e-8 };
		await saveDie(stores, { id: die, rowVersion: 1, name: 'T-12', facts: first, by: IDA });
		const second = { ...facts, area: 9e-8 };
		expect(
			await saveDie(stores, { id: die, rowVersion: 1, name: 'T-12', facts: second, by: 'lena' })
		).toMatchObject({ status: 'stale', saved: { facts: first, rowVersion: 2 } });
		expect(await findDie(stores.db, die)).toMatchObject({ facts: first });
	});

	it('that is not there can not be changed', async () => {
		expect(await saveDie(stores, { id: 99, rowVersion: 1, name: 'X', facts, by: IDA })).toEqual({
			status: 'refused',
			field: '',
			message: say.noSuchDie()
		});
	});
});

describe('a product', () => {
	it('is stored with its ordering codes in their order and recorded', async () => {
		expect(await saveProduct(stores, tuning())).toEqual({
			status: 'saved',
			partNumber: 'LKT-1130'
		});
		expect(await findProduct(stores.db, 'LKT-1130')).toMatchObject({
			dieName: 'T-12',
			rowVersion: 1,
			orderingCodes: [code('LKT-1130-T'), code('LKT-1130-R', 10_000)]
		});
		expect((await auditTrail()).at(-1)).toEqual({
			action: 'product.create',
			subject: 'LKT-1130',
			by: IDA
		});
	});

	it.each([
		[
			'a part number that is taken, however it is written',
			{ partNumber: 'lkt-1130' },
			'partNumber',
			say.partNumberTaken('LKT-1130')
		],
		[
			'a die that is gone',
			{ partNumber: 'LKT-1204', die: 99, orderingCodes: [] },
			'die',
			say.dieNotFound()
		],
		[
			'an ordering code of another product',
			{ partNumber: 'LKT-1204', orderingCodes: [code('N'), code('LKT-1130-R')] },
			{ code: 1 },
			say.codeTaken('LKT-1130-R', 'LKT-1130')
		]
	] as const)('is refused %s, and nothing is stored', async (_what, given, field, message) => {
		await saveProduct(stores, tuning());
		const before = await auditTrail();
		expect(await saveProduct(stores, tuning(given))).toEqual({ status: 'refused', field, message });
		expect(await auditTrail()).toEqual(before);
		expect(await stores.db.select().from(orderingCode)).toHaveLength(2);
	});

	it('replaces its ordering codes when it changes', async () => {
		await saveProduct(stores, tuning());
		await saveProduct(
			stores,
			tuning({ isNew: false, rowVersion: 1, orderingCodes: [code('LKT-1130-R', 8000)] })
		);
		expect(await findProduct(stores.db, 'LKT-1130')).toMatchObject({
			rowVersion: 2,
			orderingCodes: [code('LKT-1130-R', 8000)]
		});
	});

	it('tells a second editor what was saved meanwhile, and changes nothing', async () => {
		await saveProduct(stores, tuning());
		await saveProduct(stores, tuning({ isNew: false, rowVersion: 1, package: 'SOD-523' }));
		expect(
			await saveProduct(
				stores,
				tuning({ isNew: false, rowVersion: 1, package: 'SOT-23', by: 'lena' })
			)
		).toMatchObject({ status: 'stale', saved: { package: 'SOD-523', rowVersion: 2 } });
		expect(await findProduct(stores.db, 'LKT-1130')).toMatchObject({ package: 'SOD-523' });
	});

	it('that is not there can not be changed', async () => {
		expect(await saveProduct(stores, tuning({ isNew: false, rowVersion: 1 }))).toEqual({
			status: 'refused',
			field: '',
			message: say.productNotFound('LKT-1130')
		});
	});
});

describe('a product with a draft', () => {
	beforeEach(async () => {
		await saveProduct(stores, tuning());
		await ensureDefaults(stores);
		const product = await findProduct(stores.db, 'LKT-1130');
		const [template] = await stores.db.select().from(templateVersion);
		const [policy] = await stores.db.select().from(policyVersion);
		if (!product || !template || !policy) throw new Error('nothing to draft with');
		await write(stores.db, (tx) =>
			tx.insert(draft).values({
				product: product.id,
				templateVersion: template.id,
				status: 'production',
				policyVersion: policy.id,
				createdAt: AT
			})
		);
	});

	it('keeps its class, by which the draft has its template', async () => {
		expect(
			await saveProduct(stores, tuning({ isNew: false, rowVersion: 1, productClass: 'rectifier' }))
		).toEqual({
			status: 'refused',
			field: 'productClass',
			message: say.classInUse('Tuning diode')
		});
	});

	it('counts who changes it among the editors of its datasheet', async () => {
		await saveProduct(
			stores,
			tuning({ isNew: false, rowVersion: 1, description: 'Another', by: 'lena' })
		);
		const product = await findProduct(stores.db, 'LKT-1130');
		expect(await listEditors(stores.db, product?.id ?? 0)).toEqual(['lena']);
	});
});

describe('what is listed', () => {
	it('counts independent lots by wafer lot and says how far the datasheet is', async () => {
		await saveProduct(stores, tuning());
		const product = await findProduct(stores.db, 'LKT-1130');
		await write(stores.db, (tx) =>
			tx.insert(lot).values([
				{ product: product?.id ?? 0, name: 'A1', waferLot: 'A' },
				{ product: product?.id ?? 0, name: 'A2', waferLot: 'A' },
				{ product: product?.id ?? 0, name: 'B1', waferLot: 'B' }
			])
		);
		expect(await listProductRows(stores.db, '2026-11-28')).toMatchObject([
			{ partNumber: 'LKT-1130', lots: 2, temperaturesCelsius: [], datasheetText: 'none yet' }
		]);
	});

	it('describes a product with units in the names', async () => {
		await saveProduct(stores, tuning());
		expect(await describeProduct(stores.db, 'LKT-1130', '2026-11-28')).toMatchObject({
			die: {
				areaSquareMetres: 4.2e-8,
				material: { conductionStatesPerCubicMetre: 2.8e25 }
			},
			orderingCodes: [{ code: 'LKT-1130-T', devicesPerPack: 3000 }, { devicesPerPack: 10_000 }],
			datasheet: { release: null, openRevision: null, draftStatus: null }
		});
		expect(await describeProduct(stores.db, 'LKT-9', '2026-11-28')).toBeUndefined();
	});
});
