import { z } from 'zod';

export const signInForm = z.object({
	email: z.string().trim().min(1, 'Type your email.').max(200),
	password: z.string().min(1, 'Type your password.').max(200)
});
