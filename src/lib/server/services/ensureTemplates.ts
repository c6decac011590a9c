import { createHash } from 'node:crypto';
import { readdir, readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { canonicalBytes } from '$lib/core/datasheet/canonicalBytes';
import { readTemplate } from '$lib/core/template/readTemplate';
import type { Template } from '$lib/core/template/template';
import { appendAudit } from '../db/appendAudit';
import type { Database } from '../db/database';
import { listTemplateVersions } from '../db/findTemplates';
import { templateVersion } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';

/**
 * Imports the project's templates at start: version 1, or the next version where a file differs
 * from every version that is stored. A version once stored is never changed.
 *
 * @param folder where the JSON files lie; the project's own `templates` by default
 * @throws {TemplateError} for a file that is no template, with the path of what is wrong
 */
export async function ensureTemplates(
	{ db }: Pick<Stores, 'db'>,
	folder = 'templates'
): Promise<void> {
	const at = new Date().toISOString();
	const files = (await readdir(folder)).filter((name) => name.endsWith('.json')).sort();
	for (const file of files) {
		const template = readTemplate(await readFile(join(folder, file), 'utf8'), file);
		await write(db, (tx) => ensureTemplate(tx, template, at));
	}
}

async function ensureTemplate(tx: Database, template: Template, at: string): Promise<void> {
	const hash = createHash('sha256').update(canonicalBytes(template)).digest('hex');
	const stored = await listTemplateVersions(tx, template.key);
	if (stored.some((version) => version.hash === hash)) return;

	const number = (stored[0]?.number ?? 0) + 1;
	await tx.insert(templateVersion).values({
		template: template.key,
		number,
		json: template,
		hash,
		createdAt: at,
		createdBy: null
	});
	await appendAudit(tx, {
		action: 'template.import',
		subject: `template ${template.key} version ${number}`,
		by: null,
		details: { hash }
	});
}
