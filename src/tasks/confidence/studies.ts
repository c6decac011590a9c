import { CURVE_STUDIES } from './curveStudies';
import { LOTS_STUDIES } from './lotsStudies';
import { NORMAL_STUDIES } from './normalStudies';
import { ORDER_STUDIES } from './orderStudies';
import { SCREENED_STUDIES } from './screenedStudies';
import type { Study } from './study';

/** Every study, the quick ones first. */
export const STUDIES: readonly Study[] = [
	...NORMAL_STUDIES,
	...ORDER_STUDIES,
	...SCREENED_STUDIES,
	...LOTS_STUDIES,
	...CURVE_STUDIES
];
