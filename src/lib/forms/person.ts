import { z } from 'zod';
import { role } from '../core/review/permissions';

const name = z.string().trim().min(1, 'Type a name.').max(80);
const roles = z.array(role).min(1, 'Choose at least one role.');

/** At least 12 characters: NIST SP 800-63B asks for length, not for kinds of signs (from memory). */
const password = z.string().min(12, 'Use at least 12 characters.').max(200);

export const newPersonForm = z.object({
	name,
	email: z.email('Type an email address.').trim().toLowerCase().max(200),
	roles,
	password
});

export const changePersonForm = z.object({ name, roles, isActive: z.boolean().default(false) });
