import { json } from '@sveltejs/kit';
import { packSweeps } from '$lib/components/cv/packSweeps';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { problem } from '$lib/server/problem';
import { sampleSweeps } from '$lib/server/services/sampleSweeps';
import { chosenCurve } from '$lib/server/services/chosenCurve';
import type { RequestHandler } from './$types';

/** At most 80 sweeps to draw behind the band, biases in V, capacitances in `unit`. */
export const GET: RequestHandler = async ({ locals, params, url }) => {
	requirePermission(locals, 'measurement.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) return problem(404, limitMessages.noSuchProduct(params.partNumber));
	const { curve } = await chosenCurve(locals.db, product, url.searchParams);
	if (curve === undefined) return problem(409, limitMessages.noDistributions());

	const number = (value: { readonly text: string } | null) =>
		value === null ? null : Number(value.text);
	const sample = await sampleSweeps(locals.db, {
		product: product.id,
		temperatureCelsius: curve.temperatureCelsius,
		frequency: curve.frequency,
		unitScale: curve.unitScale,
		limits: new Map(
			curve.rows.map(({ limit }) => [
				limit.condition.reverseVoltage ?? 0,
				{ minimum: number(limit.minimum), maximum: number(limit.maximum) }
			])
		)
	});
	const { total, outside, sweeps } = sample;
	return json({ unit: curve.unit, total, outside, ...packSweeps(sweeps) });
};
