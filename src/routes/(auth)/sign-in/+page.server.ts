import { error, redirect } from '@sveltejs/kit';
import type { Cookies } from '@sveltejs/kit';
import { fail, setError, superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { notFound } from '$lib/core/messages';
import { signInPaused, signInRefused } from '$lib/core/messages/people';
import { ROLE_NAMES, ROLES } from '$lib/core/review/permissions';
import type { Role } from '$lib/core/review/permissions';
import { signInForm } from '$lib/forms/signIn';
import { checkSignIn } from '$lib/server/auth/signIn';
import { findPersonByEmail } from '$lib/server/db/findSignedIn';
import { findOrganization } from '$lib/server/db/findOrganization';
import { listPeople } from '$lib/server/db/listPeople';
import type { Actions, PageServerLoad } from './$types';

const DEMO_EMAIL = /@larkmoor\.test$/;

/** People stand in the order in which the job passes through their hands. */
const rank = (roles: readonly Role[]) => Math.min(...roles.map((role) => ROLES.indexOf(role)));

/** A place in this application; anything else would send people away from it. */
function wayBack(url: URL): string {
	const to = url.searchParams.get('to');
	return to !== null && /^\/(?![/\\])/.test(to) ? to : '/worklist';
}

async function begin(locals: App.Locals, cookies: Cookies, person: string): Promise<void> {
	const session = await locals.sessions.createSession(person, {});
	const { name, value, attributes } = locals.sessions.createSessionCookie(session.id);
	cookies.set(name, value, { path: '/', ...attributes });
}

export const load: PageServerLoad = async ({ locals, url }) => {
	if (locals.person !== null) redirect(303, wayBack(url));
	const [form, organization, people] = await Promise.all([
		superValidate(zod4(signInForm)),
		findOrganization(locals.db),
		locals.isDemo ? listPeople(locals.db) : []
	]);
	return {
		form,
		organization: organization.name,
		demoPeople: people
			.filter(({ email, isActive }) => isActive && DEMO_EMAIL.test(email))
			.toSorted((one, other) => rank(one.roles) - rank(other.roles))
			.map(({ name, email, roles }) => ({
				name,
				email,
				roles: roles.map((role) => ROLE_NAMES[role])
			}))
	};
};

export const actions: Actions = {
	signIn: async ({ locals, cookies, request, url, getClientAddress }) => {
		const form = await superValidate(request, zod4(signInForm));
		if (!form.valid) return fail(400, { form });

		const outcome = await checkSignIn(locals.db, locals.signInAttempts, {
			...form.data,
			address: getClientAddress()
		});
		form.data.password = '';
		if (outcome.status === 'paused')
			return setError(form, 'password', signInPaused(), { status: 429 });
		if (outcome.status === 'refused') return setError(form, 'password', signInRefused());

		await begin(locals, cookies, outcome.person);
		redirect(303, wayBack(url));
	},

	/** The demo's people come in without a password; outside the demo nobody does. */
	comeIn: async ({ locals, cookies, request, url }) => {
		if (!locals.isDemo) error(404, notFound());
		const email = (await request.formData()).get('email');
		if (typeof email !== 'string' || !DEMO_EMAIL.test(email)) error(404, notFound());
		const person = await findPersonByEmail(locals.db, email);
		if (person === undefined) error(404, notFound());

		await begin(locals, cookies, person.id);
		redirect(303, wayBack(url));
	}
};
