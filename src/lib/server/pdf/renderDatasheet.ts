import type { DatasheetDocument, DocumentSection } from '../../core/datasheet/document';
import type { PublicationRecord } from '../../core/datasheet/record';
import { capacitanceChart } from '../../plot/capacitanceChart';
import { characteristicChart } from '../../plot/characteristicChart';
import { printTheme } from '../../plot/chartTheme';
import { attachedFiles } from './attachedFiles';
import { drawChart } from './draw/drawChart';
import { drawPdf } from './draw/drawPdf';
import type { DrawnMark } from './layout/drawnMark';
import { layoutDatasheet } from './layout/layoutDatasheet';
import { chartTheme } from './layout/sections/halfFigures';

/**
 * document, record → charts as marks → placed boxes → bytes
 *
 * The same document and record give the same bytes in any process and time zone, for one
 * `rendererVersion`. Nothing else is read: no clock, no locale, no configuration.
 *
 * @throws {CharacterNotInFaceError} when a text asks for a character that the faces lack
 */
export async function renderDatasheet(
	document: DatasheetDocument,
	record: PublicationRecord
): Promise<Uint8Array> {
	const charts = await drawCharts(document);
	const files = attachedFiles(document);
	const laidOut = layoutDatasheet(document, record, { charts, attached: files });
	return drawPdf(laidOut, { document, record }, files);
}

/** The charts of a document, by their section; one with too few points has none. */
export async function drawCharts(
	document: DatasheetDocument
): Promise<ReadonlyMap<DocumentSection, readonly DrawnMark[]>> {
	const charts = new Map<DocumentSection, readonly DrawnMark[]>();
	for (const section of document.sections) {
		const specification = chartOf(section, document);
		if (specification) charts.set(section, await drawChart(specification));
	}
	return charts;
}

function chartOf(section: DocumentSection, { status }: DatasheetDocument) {
	if (section.kind === 'capacitance-chart')
		return capacitanceChart({ ...section, isProvisional: status !== 'production' }, printTheme);
	if (section.kind === 'chart') return characteristicChart(section, chartTheme(section));
	return null;
}
