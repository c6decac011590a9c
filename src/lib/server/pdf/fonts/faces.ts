import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import fontkit from '@pdf-lib/fontkit';

/** The seven faces of a printed sheet, as files of their npm packages. */
const FILES = {
	sans: '@expo-google-fonts/source-sans-3/400Regular/SourceSans3_400Regular.ttf',
	sansItalic:
		'@expo-google-fonts/source-sans-3/400Regular_Italic/SourceSans3_400Regular_Italic.ttf',
	sansBold: '@expo-google-fonts/source-sans-3/600SemiBold/SourceSans3_600SemiBold.ttf',
	sansBoldItalic:
		'@expo-google-fonts/source-sans-3/600SemiBold_Italic/SourceSans3_600SemiBold_Italic.ttf',
	slab: '@expo-google-fonts/roboto-slab/400Regular/RobotoSlab_400Regular.ttf',
	slabMedium: '@expo-google-fonts/roboto-slab/500Medium/RobotoSlab_500Medium.ttf',
	slabBold: '@expo-google-fonts/roboto-slab/700Bold/RobotoSlab_700Bold.ttf'
} as const;

/** Source Sans 3 at 400 and 600 with italics; Roboto Slab at 400, 500 and 700. */
export type Face = keyof typeof FILES;
export const FACES = Object.keys(FILES) as Face[];

export type Font = ReturnType<typeof fontkit.create>;

// The packages are dependencies and stay outside every bundle: Node finds them from this file,
// wherever the process was started.
const { resolve } = createRequire(import.meta.url);
const files = new Map<Face, Uint8Array>();
const parsed = new Map<Face, Font>();

function remember<Value>(values: Map<Face, Value>, face: Face, make: () => Value): Value {
	const known = values.get(face);
	if (known !== undefined) return known;
	const made = make();
	values.set(face, made);
	return made;
}

/** The TrueType file of a face; read once a process. */
export const fontFile = (face: Face): Uint8Array =>
	remember(files, face, () => readFileSync(resolve(FILES[face])));

/** The parsed font of a face; parsed once a process. */
export const fontOf = (face: Face): Font =>
	remember(parsed, face, () => fontkit.create(fontFile(face)));
