import type { View } from 'vega';
import type { TopLevelSpec } from 'vega-lite';

export type Scheme = 'light' | 'dark';

/** A chart as a function of where it is shown; `width` in px is what the page has for it. */
export type ChartSpec = (scheme: Scheme, width: number) => TopLevelSpec;

/** The drawing library, fetched by the first chart of a page: about 280 kB that other pages spare. */
async function loadVega() {
	const [vega, vegaLite, interpreter] = await Promise.all([
		import('vega'),
		import('vega-lite'),
		import('vega-interpreter')
	]);
	return {
		vega,
		compile: vegaLite.compile,
		expressionInterpreter: interpreter.expressionInterpreter
	};
}

/** Faces measured before they are there would put labels in the wrong place. */
const loadFaces = () =>
	Promise.all(
		["400 12px 'Source Sans 3'", "italic 400 12px 'Source Sans 3'", "600 12px 'Source Sans 3'"].map(
			(face) => document.fonts.load(face)
		)
	);

/**
 * Draws a chart into a box. Expressions are interpreted, never compiled: the content security policy
 * allows no generated code.
 */
export async function drawChart(box: HTMLElement, spec: TopLevelSpec): Promise<View> {
	const [{ vega, compile, expressionInterpreter }] = await Promise.all([loadVega(), loadFaces()]);
	const compiled = compile(spec, { config: { aria: false } });
	const runtime = vega.parse(compiled.spec, undefined, { ast: true });
	const view = new vega.View(runtime, {
		expr: expressionInterpreter,
		renderer: 'svg',
		container: box,
		hover: true,
		logLevel: vega.Error
	});
	await view.runAsync();
	// The box says in words what is drawn; what Vega calls its groups says nothing.
	box.querySelector('svg')?.setAttribute('aria-hidden', 'true');
	return view;
}

/** Hands a drawn chart to the person as a file. PNG at twice the size of the screen. */
export async function downloadChart(view: View, format: 'svg' | 'png', fileName: string) {
	const href =
		format === 'svg'
			? URL.createObjectURL(new Blob([await view.toSVG()], { type: 'image/svg+xml' }))
			: await view.toImageURL('png', 2);
	const link = document.createElement('a');
	link.href = href;
	link.download = `${fileName}.${format}`;
	link.click();
	if (format === 'svg') URL.revokeObjectURL(href);
}
