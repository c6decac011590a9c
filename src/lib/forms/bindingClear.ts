import { z } from 'zod';

/** Emptying a place. */
export const bindingClearForm = z.object({ place: z.string().min(1) });
