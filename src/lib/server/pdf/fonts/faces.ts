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
const parsed = new Map<Face, Font>();

/** The parsed font of a face; read and parsed once a process. */
export function fontOf(face: Face): Font {
	const known = parsed.get(face);
	if (known) return known;
	const font = fontkit.create(readFileSync(resolve(FILES[face])));
	parsed.set(face, font);
	return font;
}
