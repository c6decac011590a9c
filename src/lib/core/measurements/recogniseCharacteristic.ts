import { CHARACTERISTICS } from '../characteristics/catalogue';
import type { Characteristic } from '../characteristics/catalogue';

const bare = (text: string) => text.toLowerCase().replace(/[^\p{L}\p{N}]/gu, '');

const BY_NAME: ReadonlyMap<string, Characteristic> = new Map(
	CHARACTERISTICS.flatMap((entry) => [
		[bare(entry.key), entry],
		[bare(entry.name), entry]
	])
);

/**
 * The characteristic a file names by its symbol or name, however the symbol is set: `V_(BR)`, `VBR`
 * and `breakdown voltage` are one. `undefined` for what the catalogue doesn't list.
 */
export function recogniseCharacteristic(text: string): Characteristic | undefined {
	return BY_NAME.get(bare(text));
}
