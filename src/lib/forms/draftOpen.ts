import { z } from 'zod';
import { datasheetStatus } from '../core/datasheet/document';

/** What a draft starts from. */
export const draftOpenForm = z.object({
	template: z.string().min(1, 'Choose a template.'),
	policyVersion: z.coerce.number().int().positive('Choose a limit policy.'),
	status: datasheetStatus.default('production')
});
