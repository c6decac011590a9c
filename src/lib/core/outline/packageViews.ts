import { landView } from './landView';
import { nominalSizes, type PackageOutline } from './packageOutline';
import { threeLeadViews } from './threeTerminalViews';
import { chipViews, twoLeadViews } from './twoTerminalViews';
import type { View } from './view';

type Drawn = Pick<PackageOutline, 'shape' | 'dimensions' | 'land'>;

/**
 * The package from above, from the side and from its end, drawn from nominal dimensions.
 *
 * @throws {MissingDimensionError} when a dimension of its shape isn't stated
 */
export function packageViews({ shape, dimensions }: Drawn): View[] {
	const size = nominalSizes(dimensions);
	switch (shape) {
		case 'gull-two':
			return twoLeadViews(size, 'gull');
		case 'c-bend':
			return twoLeadViews(size, 'bent');
		case 'gull-three':
			return threeLeadViews(size);
		case 'chip':
			return chipViews(size);
		default:
			return shape satisfies never;
	}
}

/** The pattern to solder to; `null` for a package without one. */
export function packageLand({ shape, dimensions, land }: Drawn): View | null {
	return land.length === 0 ? null : landView(shape, nominalSizes(dimensions), nominalSizes(land));
}
