import { symbolText } from '../characteristics/symbol';
import type { DocumentSection } from './document';
import { plainText } from './plainText';
import type { Wording } from './wording';

/** What drawings, charts and models say, in words, so that a change in one of them is seen. */
export function drawingWordings(section: DocumentSection): Wording[] {
	const wording = (id: string, label: string, text: string): Wording => ({
		id: `${section.kind}.${id}`,
		label,
		text,
		area: 'text'
	});
	switch (section.kind) {
		case 'terminals':
			return [
				wording(
					'names',
					section.heading,
					[
						...section.terminals.map(({ number, name }) => `${number} ${name}`),
						`marking ${section.marking ?? 'by ordering code'}`
					].join(', ')
				)
			];
		case 'outline':
			return [
				...section.dimensions.map(({ symbol, name, minimum, nominal, maximum }) =>
					wording(
						symbolText(symbol),
						`${section.package} ${symbolText(symbol)}, ${name}`,
						`${minimum ?? '–'} / ${nominal} / ${maximum ?? '–'} mm`
					)
				),
				...section.land.map(({ symbol, name, nominal }) =>
					wording(
						`land.${symbolText(symbol)}`,
						`${section.package} land ${symbolText(symbol)}, ${name}`,
						`${nominal} mm`
					)
				)
			];
		case 'test-circuit':
			return [
				wording(
					section.circuit,
					section.heading,
					`${section.circuit}: ${plainText(section.caption)}`
				)
			];
		case 'chart':
			return [
				wording(section.heading, section.heading, plainText(section.caption)),
				...section.curves.map(({ label, points }) =>
					wording(`${section.heading}.${label}`, `${section.heading}, ${label}`, curveText(points))
				)
			];
		case 'model':
			return section.parameters.map(({ name, meaning, value, unit }) =>
				wording(name, `${section.heading}, ${name} ${meaning}`, `${value.text} ${unit}`.trim())
			);
		case 'masthead':
		case 'prose':
		case 'headline-figures':
		case 'ordering':
		case 'ratings':
		case 'thermal':
		case 'characteristics':
		case 'capacitance-table':
		case 'capacitance-chart':
		case 'revision-history':
		case 'notice':
			return [];
		default:
			return section satisfies never;
	}
}

/** First and last point and how many there are: `12 points from (0, 1.2) to (28, 40)`. */
function curveText(points: readonly (readonly [number, number])[]): string {
	const place = (point: readonly [number, number] | undefined) => `(${point?.join(', ') ?? ''})`;
	const sum = points.reduce((total, [x, y]) => total + x + y, 0);
	return `${points.length} points from ${place(points[0])} to ${place(points.at(-1))}, sum ${Number(sum.toPrecision(9))}`;
}
