import type { TemplateSection } from '../template/template';
import type { DocumentSection } from './document';
import type { ResolveInput } from './resolveInput';

type Terminals = Extract<TemplateSection, { kind: 'terminals' }>;

/** Which terminal is which, with the code on the body where all ordering codes have the same. */
export function resolveTerminals(
	{ heading, graphic, terminals, hasBand }: Terminals,
	{ orderingCodes }: Pick<ResolveInput, 'orderingCodes'>
): Extract<DocumentSection, { kind: 'terminals' }> {
	const markings = new Set(orderingCodes.map(({ marking }) => marking));
	const [only = null] = markings.size === 1 ? markings : [];
	return { kind: 'terminals', heading, graphic, terminals, hasBand, marking: only };
}
