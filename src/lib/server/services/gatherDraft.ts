import type { ResolveInput } from '$lib/core/datasheet/resolveInput';
import { productClass } from '$lib/core/template/template';
import type { Connection } from '../db/database';
import { findDraft, type FoundDraft } from '../db/findDraft';
import { findOrganization } from '../db/findOrganization';
import type { findProductByPartNumber } from '../db/findProductByPartNumber';
import { listOrderingCodes } from '../db/listOrderingCodes';
import { draftLimits } from './draftLimits';

type FoundProduct = NonNullable<Awaited<ReturnType<typeof findProductByPartNumber>>>;

export interface GatheredDraft {
	readonly draft: FoundDraft;
	readonly product: FoundProduct;
	readonly input: ResolveInput;
}

/** Everything a draft resolves from, as it stands now; `undefined` without a draft. */
export async function gatherDraft(
	db: Connection,
	product: FoundProduct
): Promise<GatheredDraft | undefined> {
	const draft = await findDraft(db, product.id);
	if (draft === undefined) return undefined;
	const { limits, policies } = await draftLimits(db, product.id, draft);
	return {
		draft,
		product,
		input: {
			template: draft.template,
			templateNumber: draft.templateNumber,
			status: draft.status,
			product: {
				partNumber: product.partNumber,
				productClass: productClass.parse(product.productClass),
				package: product.package,
				description: product.description
			},
			orderingCodes: await listOrderingCodes(db, product.id),
			organization: await findOrganization(db),
			bindings: draft.bindings,
			texts: new Map([...draft.texts].map(([block, { text }]) => [block, text])),
			limits,
			policies
		}
	};
}
