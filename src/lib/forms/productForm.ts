import { z } from 'zod';
import { productMessages as say } from '$lib/core/messages/products';
import { PRODUCT_CLASSES } from '$lib/core/template/template';

const MOST_CODES = 40;
const PART_NUMBER = /^[A-Za-z0-9][A-Za-z0-9-]{0,59}$/;
const CODE = /^[A-Za-z0-9][A-Za-z0-9./-]{0,59}$/;
const WHOLE = /^[1-9]\d{0,6}$/;

/** Text of one line, as long as the column on paper allows. */
const line = (limit: number) => z.string().trim().max(limit, say.tooLong(limit));

/** One column of the ordering codes: rows are parallel lists, so that a plain form can hold them. */
const column = () => z.string().trim().array().default([]);

const fields = z.object({
	partNumber: z
		.string()
		.trim()
		.min(1, say.partNumberNeeded())
		.refine((text) => text === '' || PART_NUMBER.test(text), say.partNumberFormat()),
	die: z.coerce.number().int().positive(say.dieNeeded()).default(0),
	elements: z
		.string()
		.trim()
		.refine((text) => /^([1-9]|1[0-6])$/.test(text), say.elementsRange())
		.default('1'),
	productClass: z.enum(PRODUCT_CLASSES, say.classNeeded()).default('rectifier'),
	package: line(40).min(1, say.packageNeeded()),
	description: line(200).default(''),
	code: column(),
	grade: column(),
	marking: column(),
	packing: column(),
	quantity: column(),
	/** The version the person opened; 0 for a new product. */
	rowVersion: z.coerce.number().int().nonnegative().default(0)
});

export const productForm = fields.superRefine((form, context) => {
	const refuse = (message: string, ...path: (string | number)[]) =>
		context.addIssue({ code: 'custom', path, message });
	if (form.code.length > MOST_CODES) refuse(say.tooManyCodes(MOST_CODES), 'code', MOST_CODES);
	form.code.forEach((code, row) => {
		if (code === '') refuse(say.codeNeeded(), 'code', row);
		else if (!CODE.test(code)) refuse(say.codeFormat(), 'code', row);
		else if (form.code.indexOf(code) < row) refuse(say.codeTwice(code), 'code', row);
		if (!WHOLE.test(form.quantity[row] ?? '')) refuse(say.quantityFormat(), 'quantity', row);
		for (const name of ['grade', 'marking', 'packing'] as const)
			if ((form[name][row] ?? '').length > 40) refuse(say.tooLong(40), name, row);
	});
});
export type ProductForm = z.infer<typeof fields>;

export interface OrderingCode {
	readonly code: string;
	readonly grade: string;
	readonly marking: string;
	readonly packing: string;
	readonly quantity: number;
}

/** The ordering codes of a valid form, row by row. */
export function orderingCodesOf(form: ProductForm): OrderingCode[] {
	return form.code.map((code, row) => ({
		code,
		grade: form.grade[row] ?? '',
		marking: form.marking[row] ?? '',
		packing: form.packing[row] ?? '',
		quantity: Number(form.quantity[row])
	}));
}

const CODE_COLUMNS = ['code', 'grade', 'marking', 'packing', 'quantity'] as const;

/** The form with one more empty row of ordering codes. */
export function withRow(form: ProductForm): ProductForm {
	const length = form.code.length;
	const grown = Object.fromEntries(
		CODE_COLUMNS.map((name) => [name, [...form[name].slice(0, length), '']])
	);
	return { ...form, ...grown };
}

/** The form without one row of ordering codes; as it is when there is no such row. */
export function withoutRow(form: ProductForm, row: number): ProductForm {
	if (row < 0 || row >= form.code.length) return form;
	const shrunk = Object.fromEntries(
		CODE_COLUMNS.map((name) => [name, form[name].toSpliced(row, 1)])
	);
	return { ...form, ...shrunk };
}

/** A stored product as the form shows it. */
export function productFields(stored: {
	readonly partNumber: string;
	readonly die: number;
	readonly elements: number;
	readonly productClass: ProductForm['productClass'];
	readonly package: string;
	readonly description: string;
	readonly rowVersion: number;
	readonly orderingCodes: readonly OrderingCode[];
}): ProductForm {
	const { orderingCodes, elements, ...rest } = stored;
	return {
		partNumber: rest.partNumber,
		die: rest.die,
		elements: String(elements),
		productClass: rest.productClass,
		package: rest.package,
		description: rest.description,
		code: orderingCodes.map(({ code }) => code),
		grade: orderingCodes.map(({ grade }) => grade),
		marking: orderingCodes.map(({ marking }) => marking),
		packing: orderingCodes.map(({ packing }) => packing),
		quantity: orderingCodes.map(({ quantity }) => String(quantity)),
		rowVersion: rest.rowVersion
	};
}

/** Which row the button *Remove* of a plain form names; −1 when it names none. */
export function rowToRemove(entries: FormData): number {
	const row = entries.get('row');
	return typeof row === 'string' && /^\d{1,3}$/.test(row) ? Number(row) : -1;
}

/** What a second editor is told the fields are called. */
export const PRODUCT_FIELD_NAMES = {
	die: 'die',
	elements: 'elements',
	productClass: 'class',
	package: 'package',
	description: 'description',
	code: 'ordering codes',
	grade: 'grades',
	marking: 'markings',
	packing: 'packings',
	quantity: 'quantities'
} as const satisfies Partial<Record<keyof ProductForm, string>>;
