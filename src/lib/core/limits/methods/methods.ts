import { limitMessages } from '../../messages/limits';
import type { LimitMethod } from '../policy';
import type { Method } from './method';
import { normalMethod } from './normal';
import { sigmaMethod } from './sigma';

const notYet =
	(method: LimitMethod): Method =>
	() => ({ status: 'refused', message: limitMessages.methodNotYet(method) });

/** The one place that knows which method is computed where. */
export const METHODS = {
	normal: normalMethod,
	sigma: sigmaMethod,
	lots: notYet('lots'),
	order: notYet('order')
} as const satisfies Record<LimitMethod, Method>;
