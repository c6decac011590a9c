import { error, fail, redirect } from '@sveltejs/kit';
import { measurementMessages } from '$lib/core/messages/measurements';
import { isPermitted } from '$lib/core/review/permissions';
import { mappingValues, readMappingForm } from '$lib/forms/mappingForm';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findUpload } from '$lib/server/db/findUpload';
import { mapUpload } from '$lib/server/services/mapUpload';
import { uploadProgress } from '$lib/server/services/uploadProgress';
import type { Actions, PageServerLoad } from './$types';

async function uploadOf({ db }: App.Locals, params: { upload: string; partNumber: string }) {
	const id = Number(params.upload);
	const found = await findUpload(db, id);
	if (found === undefined || found.partNumber !== params.partNumber) {
		error(404, measurementMessages.uploadNotFound(id));
	}
	return found;
}

const textOf = (form: FormData): Record<string, string> =>
	Object.fromEntries(
		[...form].flatMap(([name, value]) => (typeof value === 'string' ? [[name, value]] : []))
	);

export const load: PageServerLoad = async ({ locals, params, depends }) => {
	depends('platen:data');
	const person = requirePermission(locals, 'measurement.read');
	const upload = await uploadOf(locals, params);
	if (upload.set !== null) {
		redirect(
			303,
			`/products/${encodeURIComponent(params.partNumber)}/measurements/sets/${upload.set}`
		);
	}
	return {
		upload,
		work: await uploadProgress(locals.db, upload),
		values: upload.preview && mappingValues(upload.preview, upload.confirmed),
		canMap: isPermitted(person.roles, 'measurement.upload')
	};
};

export const actions: Actions = {
	map: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'measurement.upload');
		const upload = await uploadOf(locals, params);
		const values = textOf(await request.formData());
		if (upload.preview === null) {
			return fail(409, { values, errors: {}, message: measurementMessages.cannotBeRead() });
		}
		const read = readMappingForm(values, upload.preview);
		if (read.status === 'wrong') {
			return fail(400, { values, errors: read.errors, message: undefined });
		}
		const outcome = await mapUpload(locals, {
			upload: upload.id,
			request: read.request,
			by: person.id
		});
		if (outcome.status === 'refused') {
			return fail(409, { values, errors: {}, message: outcome.message });
		}
		return { values, errors: {}, message: undefined };
	}
};
