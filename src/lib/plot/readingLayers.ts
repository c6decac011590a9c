import type { CapacitancePoint } from './capacitancePoint';
import type { Layer } from './chartParts';
import { strokeMark } from './chartParts';
import type { ChartTheme } from './chartTheme';

interface Row extends CapacitancePoint {
	readonly below: number | null;
	readonly above: number | null;
}

const signed = (percent: number) =>
	`${percent < 0 ? '\u2212' : '+'}${Math.abs(percent).toFixed(1)}\u00a0%`;

const number = (value: number) => String(Number(value.toPrecision(6)));

/** The lines that stand in the upper right corner while the pointer is near a row's bias. */
export function readingText(row: Row, unit: string): string[] {
	return [
		`at ${row.bias}\u00a0V, in ${unit}`,
		...(row.maximum === null ? [] : [`max ${number(row.maximum)}  ${signed(row.above ?? 0)}`]),
		`typ ${number(row.typical)}`,
		...(row.minimum === null ? [] : [`min ${number(row.minimum)}  ${signed(row.below ?? 0)}`])
	];
}

/** A line at the bias nearest to the pointer, and the row's values in the free corner. */
export function readingLayers(
	rows: readonly Row[],
	unit: string,
	frame: { readonly width: number },
	theme: ChartTheme
): Layer[] {
	const values = rows.map((row) => ({ ...row, lines: readingText(row, unit) }));
	const shown = { filter: { param: 'reading', empty: false } };
	return [
		{
			data: { values },
			params: [
				{
					name: 'reading',
					select: {
						type: 'point',
						encodings: ['x'],
						nearest: true,
						on: 'pointermove',
						clear: 'pointerout'
					}
				}
			],
			mark: { type: 'point', opacity: 0, size: 100 },
			encoding: { y: { field: 'typical', type: 'quantitative' } }
		},
		{ data: { values }, transform: [shown], mark: { type: 'rule', ...strokeMark(theme.leader) } },
		{
			data: { values },
			transform: [shown],
			mark: {
				type: 'text',
				align: 'right',
				baseline: 'top',
				fontSize: theme.labelSize,
				lineHeight: theme.labelSize * 1.4,
				color: theme.ink
			},
			encoding: {
				x: { value: frame.width - theme.labelSize },
				y: { value: theme.labelSize },
				text: { field: 'lines', type: 'nominal' }
			}
		}
	];
}
