import { error, json } from '@sveltejs/kit';
import { notFound } from '$lib/core/messages';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findJob } from '$lib/server/db/findJob';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async ({ locals, params }) => {
	requirePermission(locals, 'measurement.read');
	const found = await findJob(locals.db, Number(params.job));
	if (found === undefined) error(404, notFound());

	const { id, kind, state, attempt, progress, result, error: reason, createdAt, endedAt } = found;
	return json({ id, kind, state, attempt, progress, result, error: reason, createdAt, endedAt });
};
