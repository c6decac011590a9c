import { z } from 'zod';

export const newTokenForm = z.object({
	name: z.string().trim().min(1, 'Say what the token is for.').max(80)
});

export const revokeTokenForm = z.object({ token: z.coerce.number().int().positive() });
