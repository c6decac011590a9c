import { PDFName, PDFString, type PDFContext, type PDFDict } from 'pdf-lib';
import { sRgbProfile } from '../colour/sRgbProfile';

const NAME = PDFString.of('sRGB IEC 61966-2-1');

/** What the numbers of its colours mean, with the profile itself (ISO 19005-3, 6.2.3). */
export function writeOutputIntent(context: PDFContext, catalog: PDFDict): void {
	const profile = context.register(context.flateStream(sRgbProfile(), { N: 3 }));
	const intent = context.register(
		context.obj({
			Type: 'OutputIntent',
			S: 'GTS_PDFA1',
			OutputConditionIdentifier: NAME,
			Info: NAME,
			DestOutputProfile: profile
		})
	);
	catalog.set(PDFName.of('OutputIntents'), context.obj([intent]));
}
