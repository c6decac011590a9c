import { draftMessages } from '$lib/core/messages/datasheet';
import type { DatasheetStatus } from '$lib/core/datasheet/document';
import { CLASS_NAMES, productClass } from '$lib/core/template/template';
import { appendAudit } from '../db/appendAudit';
import { findPolicyVersion } from '../db/findPolicies';
import { findProductByPartNumber } from '../db/findProductByPartNumber';
import { listTemplateVersions } from '../db/findTemplates';
import { draft, draftEdit } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';
import { refused, type DraftEditor, type Refused } from './editDraft';
import { findDraft } from '../db/findDraft';

export interface NewDraft extends DraftEditor {
	/** Key of the template; its newest version is taken. */
	readonly template: string;
	/** The limit policy new bindings take. */
	readonly policyVersion: number;
	readonly status: DatasheetStatus;
}

/** Opens the one draft of a product, with nothing bound yet. */
export async function openDraft(
	{ db }: Pick<Stores, 'db'>,
	{ partNumber, template: key, policyVersion, status, by }: NewDraft
): Promise<{ status: 'opened'; draft: number } | Refused> {
	const at = new Date().toISOString();
	return write(db, async (tx) => {
		const product = await findProductByPartNumber(tx, partNumber);
		if (product === undefined) return refused(draftMessages.productUnknown(partNumber));
		if (await findDraft(tx, product.id)) return refused(draftMessages.draftAlreadyOpen(partNumber));
		const [newest] = await listTemplateVersions(tx, key);
		if (newest === undefined) return refused(draftMessages.templateUnknown(key));
		const wanted = productClass.parse(product.productClass);
		if (newest.template.productClass !== wanted)
			return refused(draftMessages.templateOfOtherClass(newest.template.name, CLASS_NAMES[wanted]));
		if ((await findPolicyVersion(tx, policyVersion)) === undefined)
			return refused(draftMessages.policyVersionUnknown());

		const [opened] = await tx
			.insert(draft)
			.values({
				product: product.id,
				templateVersion: newest.id,
				status,
				policyVersion,
				createdAt: at
			})
			.returning({ id: draft.id });
		if (opened === undefined) throw new Error('the draft was not stored');
		await tx.insert(draftEdit).values({ draft: opened.id, person: by, what: 'open', at });
		await appendAudit(tx, {
			action: 'draft.open',
			subject: `${partNumber} draft`,
			by,
			details: { template: key, version: newest.number, status, policyVersion }
		});
		return { status: 'opened', draft: opened.id };
	});
}
