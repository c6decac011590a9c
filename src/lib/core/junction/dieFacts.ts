import { z } from 'zod';
import { material } from './material';

/** What carries the current in the lightly doped side. */
export const CONDUCTIVITY_NAMES = { n: 'n-type', p: 'p-type' } as const;
export const conductivity = z.enum(['n', 'p']);
export type Conductivity = z.infer<typeof conductivity>;

export const JUNCTION_NAMES = {
	'metal-semiconductor': 'metal–semiconductor',
	'p-n': 'p–n'
} as const;
export const junctionKind = z.enum(['metal-semiconductor', 'p-n']);
export type JunctionKind = z.infer<typeof junctionKind>;

/** What a chip design is, as evaluation needs it. Stored in `die.facts`. */
export const dieFacts = z.object({
	/** Junction area in m². */
	area: z.number().positive().max(1),
	material,
	conductivity,
	junction: junctionKind
});
export type DieFacts = z.infer<typeof dieFacts>;
