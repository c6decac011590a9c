import * as vega from 'vega';
import { compile, type TopLevelSpec } from 'vega-lite';
import type { DrawnMark } from '../layout/drawnMark';
import { RecordingContext } from './RecordingContext';

/** Charts drawn lately, by their specification: a proof is rendered again with every edited word. */
const drawn = new Map<string, readonly DrawnMark[]>();
const KEPT = 32;

/** What a warning of the chart library says is a fault of the specification. */
export class ChartSpecificationError extends Error {
	override readonly name = 'ChartSpecificationError';
}

const refuseWarnings = {
	level: () => refuseWarnings,
	error: (...parts: unknown[]) => refuse(parts),
	warn: (...parts: unknown[]) => refuse(parts),
	info: () => refuseWarnings,
	debug: () => refuseWarnings
};

function refuse(parts: readonly unknown[]): never {
	throw new ChartSpecificationError(parts.map(String).join(' '));
}

/** Draws a chart with Vega's own canvas renderer into a list of marks: vectors, and text as text. */
export async function drawChart(specification: TopLevelSpec): Promise<readonly DrawnMark[]> {
	const key = JSON.stringify(specification);
	const known = drawn.get(key);
	if (known) return known;

	const { spec } = compile(specification, { logger: refuseWarnings });
	const view = new vega.View(vega.parse(spec), { renderer: 'none' });
	const context = new RecordingContext();
	await view.toCanvas(1, { externalContext: context });
	view.finalize();

	const oldest = drawn.size >= KEPT ? drawn.keys().next().value : undefined;
	if (oldest !== undefined) drawn.delete(oldest);
	drawn.set(key, context.marks);
	return context.marks;
}
