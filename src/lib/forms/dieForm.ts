import { z } from 'zod';
import { conductivity, junctionKind, type DieFacts } from '$lib/core/junction/dieFacts';
import { findMaterialPreset, MATERIAL_PRESETS, type Material } from '$lib/core/junction/material';
import { productMessages as say } from '$lib/core/messages/products';
import { inSi, inUnit } from '$lib/core/units/unit';
import { decimalField, typedNumber } from './decimalField';

/** One mm² in m². */
const SQUARE_MILLIMETRE = 1e-6;
/** One cm⁻³ in m⁻³. */
const PER_CUBIC_CENTIMETRE = 1e6;

export const dieForm = z.object({
	name: z.string().trim().min(1, say.dieNameNeeded()).max(60, say.tooLong(60)),
	/** In mm². */
	area: decimalField((value) => value > 0 && value <= 10_000, say.areaFormat()),
	conductivity: z.enum(conductivity.options, say.choose()).default('n'),
	junction: z.enum(junctionKind.options, say.choose()).default('metal-semiconductor'),
	/** The preset last taken; the constants below it are what counts. */
	preset: z.string().default('si'),
	materialName: z.string().trim().min(1, say.materialNameNeeded()).max(40, say.tooLong(40)),
	relativePermittivity: decimalField(
		(value) => value > 1 && value < 1000,
		say.permittivityFormat()
	),
	/** N_C and N_V in cm⁻³. */
	conductionStates: decimalField((value) => value > 0, say.statesFormat()),
	valenceStates: decimalField((value) => value > 0, say.statesFormat()),
	source: z.string().trim().min(1, say.sourceNeeded()).max(300, say.tooLong(300)),
	/** The version the person opened; 0 for a new die. */
	rowVersion: z.coerce.number().int().nonnegative().default(0)
});
export type DieForm = z.infer<typeof dieForm>;

/** How a density is typed: 2.8e19. */
const densityText = (states: number) =>
	inUnit(states, PER_CUBIC_CENTIMETRE).toExponential().replace('e+', 'e');

const constantsOf = (material: Material) => ({
	materialName: material.name,
	relativePermittivity: String(material.relativePermittivity),
	conductionStates: densityText(material.conductionStates),
	valenceStates: densityText(material.valenceStates),
	source: material.source
});

/** The constants of a preset as the fields hold them; nothing for an unknown key. */
export function presetFields(key: string): Partial<ReturnType<typeof constantsOf>> {
	const preset = findMaterialPreset(key);
	return preset === undefined ? {} : constantsOf(preset);
}

/** What a new die's form starts with. */
export const newDie = (): DieForm => ({
	name: '',
	area: '',
	conductivity: 'n',
	junction: 'metal-semiconductor',
	preset: 'si',
	...constantsOf(MATERIAL_PRESETS.si),
	rowVersion: 0
});

/** A stored die as the form shows it. */
export function dieFields(stored: {
	readonly name: string;
	readonly facts: DieFacts;
	readonly rowVersion: number;
}): DieForm {
	const { area, material, conductivity, junction } = stored.facts;
	const preset = Object.entries(MATERIAL_PRESETS).find(([, { name }]) => name === material.name);
	return {
		name: stored.name,
		area: String(inUnit(area, SQUARE_MILLIMETRE)),
		conductivity,
		junction,
		preset: preset?.[0] ?? 'si',
		...constantsOf(material),
		rowVersion: stored.rowVersion
	};
}

/** A number that the schema has checked already. */
function checked(text: string): number {
	const value = typedNumber(text);
	if (value === undefined) throw new RangeError(`a valid form requires a number, got "${text}"`);
	return value;
}

/** The facts of a valid form, in SI. */
export function dieFactsOf(form: DieForm): DieFacts {
	const perCubicMetre = (text: string) =>
		inSi(checked(text), { symbol: 'cm⁻³', scale: PER_CUBIC_CENTIMETRE });
	return {
		area: inSi(checked(form.area), { symbol: 'mm²', scale: SQUARE_MILLIMETRE }),
		material: {
			name: form.materialName,
			relativePermittivity: checked(form.relativePermittivity),
			conductionStates: perCubicMetre(form.conductionStates),
			valenceStates: perCubicMetre(form.valenceStates),
			source: form.source
		},
		conductivity: form.conductivity,
		junction: form.junction
	};
}

/** What a second editor is told the fields are called. */
export const DIE_FIELD_NAMES = {
	name: 'name',
	area: 'area in mm²',
	conductivity: 'conductivity',
	junction: 'junction',
	materialName: 'material',
	relativePermittivity: 'relative permittivity',
	conductionStates: 'conduction band, cm⁻³',
	valenceStates: 'valence band, cm⁻³',
	source: 'source'
} as const satisfies Partial<Record<keyof DieForm, string>>;
