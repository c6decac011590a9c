import { runOn } from './tools';

/** An object as qpdf writes it in JSON: references `7 0 R`, names `/Link`, strings `u:` or `b:`. */
export type PdfValue =
	string | number | boolean | null | readonly PdfValue[] | { readonly [key: string]: PdfValue };
export type PdfDict = { readonly [key: string]: PdfValue };

/** A file as qpdf reads it. */
export interface PdfObjects {
	readonly trailer: PdfDict;
	readonly catalog: PdfDict;
	/** Every dictionary, those of streams among them. */
	readonly dicts: readonly PdfDict[];
	/** Every string, number and name anywhere. */
	readonly scalars: readonly (string | number)[];
	/** What a reference stands for; a stream gives its dictionary. */
	readonly follow: (value: PdfValue | undefined) => PdfValue | undefined;
	readonly dict: (value: PdfValue | undefined) => PdfDict;
	readonly list: (value: PdfValue | undefined) => readonly PdfValue[];
	/** What a stream holds, unpacked. */
	readonly data: (reference: PdfValue | undefined) => Buffer;
	readonly pages: readonly PdfDict[];
}

interface Entry {
	readonly value?: PdfValue;
	readonly stream?: { readonly data: string; readonly dict: PdfDict };
}

const isDict = (value: PdfValue | undefined): value is PdfDict =>
	typeof value === 'object' && value !== null && !Array.isArray(value);

/** Reads every object of a PDF with qpdf. */
export function readObjects(bytes: Uint8Array): PdfObjects {
	const text = runOn(bytes, 'qpdf', (file) => [
		'--json=2',
		'--json-key=qpdf',
		'--json-key=pages',
		'--json-stream-data=inline',
		'--decode-level=generalized',
		file
	]);
	const json = JSON.parse(text) as {
		qpdf: [unknown, Record<string, Entry>];
		pages: { object: string }[];
	};
	const entries = json.qpdf[1];
	const entry = (value: PdfValue | undefined): Entry | undefined =>
		typeof value === 'string' && /^\d+ \d+ R$/.test(value) ? entries[`obj:${value}`] : undefined;
	const follow = (value: PdfValue | undefined) => {
		const found = entry(value);
		return found === undefined ? value : (found.stream?.dict ?? found.value);
	};
	const dict = (value: PdfValue | undefined): PdfDict => {
		const found = follow(value);
		return isDict(found) ? found : {};
	};
	const list = (value: PdfValue | undefined): readonly PdfValue[] => {
		const found = follow(value);
		return Array.isArray(found) ? (found as readonly PdfValue[]) : [];
	};
	const dicts: PdfDict[] = [];
	const scalars: (string | number)[] = [];
	const visit = (value: PdfValue | undefined): void => {
		if (typeof value === 'string' || typeof value === 'number') scalars.push(value);
		if (Array.isArray(value)) value.forEach(visit);
		if (!isDict(value)) return;
		dicts.push(value);
		scalars.push(...Object.keys(value));
		Object.values(value).forEach(visit);
	};
	for (const each of Object.values(entries)) visit(each.stream?.dict ?? each.value);
	const trailer = dict(entries.trailer?.value);
	return {
		trailer,
		catalog: dict(trailer['/Root']),
		dicts,
		scalars,
		follow,
		dict,
		list,
		data: (reference) => Buffer.from(entry(reference)?.stream?.data ?? '', 'base64'),
		pages: json.pages.map(({ object }) => dict(object))
	};
}

/** A text string as it reads. */
export const textOf = (value: PdfValue | undefined): string =>
	typeof value === 'string' ? value.replace(/^u:/, '') : '';
