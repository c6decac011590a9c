import { findPackage } from '../outline/packages';
import type { TemplateSection } from '../template/template';
import type { DocumentSection } from './document';
import type { ResolveInput } from './resolveInput';

type Outline = Extract<TemplateSection, { kind: 'outline' }>;

/** The product's package with its dimensions; `null` where its outline isn't known. */
export function resolveOutline(
	{ heading, hasLand }: Outline,
	{ product }: Pick<ResolveInput, 'product'>
): Extract<DocumentSection, { kind: 'outline' }> | null {
	const known = findPackage(product.package);
	if (known === undefined) return null;
	return {
		kind: 'outline',
		heading,
		package: known.name,
		shape: known.shape,
		dimensions: [...known.dimensions],
		land: hasLand ? [...known.land] : []
	};
}
