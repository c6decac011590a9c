import { error, fail, redirect } from '@sveltejs/kit';
import { measurementMessages } from '$lib/core/messages/measurements';
import { productNotFound } from '$lib/core/messages/review';
import { isPermitted } from '$lib/core/review/permissions';
import { FORM_FILE_LIMIT } from '$lib/server/auth/bodyLimit';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { countOpenSuspects } from '$lib/server/db/countOpenSuspects';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { listMeasurementSets } from '$lib/server/db/listMeasurementSets';
import { listUploads } from '$lib/server/db/listUploads';
import { receiveUpload } from '$lib/server/services/receiveUpload';
import { uploadProgress } from '$lib/server/services/uploadProgress';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, depends }) => {
	depends('platen:data');
	const person = requirePermission(locals, 'measurement.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) error(404, productNotFound(params.partNumber));

	const uploads = await listUploads(locals.db, product.id);
	const sets = await listMeasurementSets(locals.db, product.id);
	return {
		uploads: await Promise.all(
			uploads.map(async (upload) => ({
				...upload,
				progress: await uploadProgress(locals.db, upload)
			}))
		),
		sets: await Promise.all(
			sets.map(async (set) => ({
				...set,
				openSuspects: await countOpenSuspects(locals.db, set.id)
			}))
		),
		canUpload: isPermitted(person.roles, 'measurement.upload'),
		uploadLimit: locals.uploadLimit
	};
};

export const actions: Actions = {
	/** For small files, where the page's own upload does not run. */
	upload: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'measurement.upload');
		const files = (await request.formData())
			.getAll('file')
			.filter((entry) => typeof entry !== 'string')
			.filter(({ name }) => name !== '');
		if (files.length === 0) return fail(400, { message: measurementMessages.chooseFile() });

		const here = `/products/${encodeURIComponent(params.partNumber)}/measurements`;
		const refusals: string[] = [];
		let address = here;
		for (const file of files) {
			const outcome = await receiveUpload(locals, {
				partNumber: params.partNumber,
				fileName: file.name,
				body: file.stream(),
				by: person.id,
				limit: Math.min(FORM_FILE_LIMIT, locals.uploadLimit)
			});
			if (outcome.status === 'refused') refusals.push(`${file.name}: ${outcome.message}`);
			else if (files.length === 1) address = `${here}/uploads/${outcome.upload}`;
		}
		if (refusals.length > 0) return fail(409, { message: refusals.join(' ') });
		redirect(303, address);
	}
};
