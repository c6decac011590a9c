import type { ChartTheme } from './chartTheme';
import type { LogAxis } from './logAxis';

/** Type, frame and ticks that all charts share. */
export function chartConfig(theme: ChartTheme) {
	return {
		font: theme.font,
		view: { stroke: theme.frame.color, strokeWidth: theme.frame.width },
		axis: {
			domain: false,
			labelFontSize: theme.tickSize,
			labelColor: theme.ink,
			labelFlush: false,
			labelOverlap: false,
			labelPadding: theme.tickSize * 0.35,
			tickColor: theme.frame.color,
			tickWidth: theme.frame.width,
			tickSize: theme.tickSize * 0.4,
			titleColor: theme.ink,
			titleFontSize: theme.axisSize,
			titleFontWeight: 'normal' as const
		}
	};
}

/** Tells which of an axis' lines are decades and which carry a label. */
const among = (values: readonly number[]) => `indexof([${values.join(',')}], datum.value) >= 0`;

/** An axis whose lines are given one by one: decades stronger, labels where they are asked for. */
export function lineAxis(axis: LogAxis, theme: ChartTheme, hasLabels = true) {
	return {
		values: [...axis.lines],
		labelExpr: hasLabels ? `${among(axis.labels)} ? format(datum.value, '~g') : ''` : `''`,
		grid: true,
		gridColor: {
			condition: { test: among(axis.decades), value: theme.decade.color },
			value: theme.grid.color
		},
		gridWidth: {
			condition: { test: among(axis.decades), value: theme.decade.width },
			value: theme.grid.width
		},
		ticks: hasLabels,
		tickOpacity: { condition: { test: among(axis.labels), value: 1 }, value: 0 }
	};
}
