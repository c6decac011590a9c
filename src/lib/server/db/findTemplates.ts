import { asc, desc, eq } from 'drizzle-orm';
import { parseTemplate } from '$lib/core/template/readTemplate';
import type { Template } from '$lib/core/template/template';
import type { Database } from './database';
import { templateVersion } from './schema';

export interface StoredTemplate {
	readonly id: number;
	readonly key: string;
	readonly number: number;
	readonly hash: string;
	readonly createdAt: string;
	readonly template: Template;
}

/** The newest version of every template, by its key. */
export async function listTemplates(db: Database): Promise<StoredTemplate[]> {
	const rows = await db
		.select()
		.from(templateVersion)
		.orderBy(asc(templateVersion.template), asc(templateVersion.number));
	const newest = new Map<string, StoredTemplate>();
	for (const row of rows) newest.set(row.template, parsed(row));
	return [...newest.values()];
}

/** Every version of a template, newest first; none where there is no such template. */
export async function listTemplateVersions(db: Database, key: string): Promise<StoredTemplate[]> {
	const rows = await db
		.select()
		.from(templateVersion)
		.where(eq(templateVersion.template, key))
		.orderBy(desc(templateVersion.number));
	return rows.map(parsed);
}

function parsed(row: typeof templateVersion.$inferSelect): StoredTemplate {
	const { id, template: key, number, hash, createdAt } = row;
	const template = parseTemplate(row.json, `template ${key}, version ${number}`);
	return { id, key, number, hash, createdAt, template };
}
