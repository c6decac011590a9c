import { z } from 'zod';

/**
 * A semiconductor as C–V evaluation needs it, at 300 K. Handbooks differ (densities of states by
 * 15 %), so every number is a person's to change, and the source says where it comes from.
 */
export const material = z.object({
	name: z.string().trim().min(1).max(40),
	/** Static, ε_s / ε_0. */
	relativePermittivity: z.number().gt(1).lt(1000),
	/** Effective density of states of the conduction band, N_C, in m⁻³. */
	conductionStates: z.number().positive(),
	/** Effective density of states of the valence band, N_V, in m⁻³. */
	valenceStates: z.number().positive(),
	source: z.string().trim().min(1).max(300)
});
export type Material = z.infer<typeof material>;

const SZE =
	'From memory: S. M. Sze, Physics of Semiconductor Devices, 2nd edition (1981), appendix of properties at 300 K';
const LEVINSHTEIN =
	'From memory: Levinshtein, Rumyantsev and Shur (editors), Properties of Advanced Semiconductor Materials (2001), 300 K';

/** Starting values by key. All are from memory: check them against your own handbook. */
export const MATERIAL_PRESETS = {
	si: {
		name: 'Si',
		relativePermittivity: 11.9,
		conductionStates: 2.8e25,
		valenceStates: 1.04e25,
		source: SZE
	},
	gaas: {
		name: 'GaAs',
		relativePermittivity: 13.1,
		conductionStates: 4.7e23,
		valenceStates: 7e24,
		source: SZE
	},
	'4h-sic': {
		name: '4H-SiC',
		relativePermittivity: 9.66,
		conductionStates: 1.7e25,
		valenceStates: 2.5e25,
		source: `${LEVINSHTEIN}; permittivity across the c axis`
	},
	gan: {
		name: 'GaN',
		relativePermittivity: 8.9,
		conductionStates: 2.3e24,
		valenceStates: 4.6e25,
		source: `${LEVINSHTEIN}; wurtzite`
	},
	ge: {
		name: 'Ge',
		relativePermittivity: 16,
		conductionStates: 1.04e25,
		valenceStates: 6e24,
		source: SZE
	}
} as const satisfies Record<string, Material>;

export type MaterialKey = keyof typeof MATERIAL_PRESETS;

/** The preset with this key, or `undefined`. */
export function findMaterialPreset(key: string): Material | undefined {
	const presets: Readonly<Record<string, Material>> = MATERIAL_PRESETS;
	return Object.hasOwn(presets, key) ? presets[key] : undefined;
}
