import type { LimitMethod } from '../policy';
import { lotsMethod } from './lots';
import type { Method } from './method';
import { normalMethod } from './normal';
import { orderMethod } from './order';
import { sigmaMethod } from './sigma';

/** The one place that knows which method is computed where. */
export const METHODS = {
	lots: lotsMethod,
	normal: normalMethod,
	order: orderMethod,
	sigma: sigmaMethod
} as const satisfies Record<LimitMethod, Method>;
