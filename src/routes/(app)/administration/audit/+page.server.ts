import { requirePermission } from '$lib/server/auth/requirePermission';
import { listAudit } from '$lib/server/db/listAudit';
import { verifyAuditChain } from '$lib/server/db/verifyAuditChain';
import type { PageServerLoad } from './$types';

const ROWS = 100;

export const load: PageServerLoad = async ({ locals, url, depends }) => {
	depends('platen:data');
	requirePermission(locals, 'audit.read');
	const before = Number(url.searchParams.get('before'));
	const rows = await listAudit(locals.db, {
		limit: ROWS,
		...(Number.isInteger(before) && before > 0 ? { before } : {})
	});
	const chain = await verifyAuditChain(locals.db, await locals.auditHead());
	return {
		rows: rows.slice(0, ROWS).map((row) => ({ ...row, hash: row.hash.slice(0, 12) })),
		older: rows.length > ROWS ? rows[ROWS - 1]?.seq : undefined,
		chain: chain.status === 'whole' ? { status: chain.status, rows: chain.rows } : chain
	};
};
