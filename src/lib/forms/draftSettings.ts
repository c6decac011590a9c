import { z } from 'zod';
import { datasheetStatus } from '../core/datasheet/document';

/** What a draft is to become, and the limit policy of new bindings. */
export const draftSettingsForm = z.object({
	status: datasheetStatus,
	policyVersion: z.coerce.number().int().positive('Choose a limit policy.')
});
