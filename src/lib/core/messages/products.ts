const count = (size: number, one: string, many = `${one}s`) => `${size} ${size === 1 ? one : many}`;

export const productMessages = {
	partNumberNeeded: () => 'A product needs a part number.',
	partNumberFormat: () =>
		'A part number is made of letters, digits and dashes, at most 60, and starts with a letter or digit.',
	partNumberTaken: (partNumber: string) => `There is a product ${partNumber} already.`,
	productNotFound: (partNumber: string) => `There is no product ${partNumber}.`,
	classNeeded: () => 'Choose a class: it decides the template of the datasheet.',
	classInUse: (name: string) =>
		`The datasheet of this product is a draft of the class ${name}, so the class stays.`,
	packageNeeded: () => 'A product needs a package.',
	dieNeeded: () => 'Choose the die.',
	dieNotFound: () => 'That die is not there any more. Choose another.',
	elementsRange: () => 'A product has 1 to 16 elements of its die.',
	tooLong: (limit: number) => `At most ${limit} characters.`,
	codeNeeded: () => 'Write the ordering code, or remove the row.',
	codeFormat: () => 'An ordering code is made of letters, digits, dashes, dots and slashes.',
	codeTwice: (code: string) => `The ordering code ${code} stands here twice.`,
	codeTaken: (code: string, partNumber: string) =>
		`The ordering code ${code} belongs to ${partNumber}.`,
	quantityFormat: () => 'The quantity of a pack is a whole number above 0.',
	tooManyCodes: (limit: number) => `A product has at most ${limit} ordering codes.`,

	dieNameNeeded: () => 'A die needs a name.',
	dieNameTaken: (name: string) => `There is a die ${name} already.`,
	noSuchDie: () => 'There is no such die.',
	areaFormat: () => 'The junction area is a number above 0 in mm², at most 10 000.',
	permittivityFormat: () => 'The relative permittivity is a number between 1 and 1000.',
	statesFormat: () => 'The density of states is a number above 0 in cm⁻³, such as 2.8e19.',
	sourceNeeded: () => 'Say where the numbers come from: a handbook, a measurement, your memory.',
	materialNameNeeded: () => 'Name the material.',
	choose: () => 'Choose one.',

	/** Second editor of the same product or die. */
	changedMeanwhile: (changes: readonly { readonly name: string; readonly saved: string }[]) =>
		changes.length === 0
			? 'Somebody saved this after you opened it, with the same entries as yours. Save again to settle it.'
			: `Somebody saved this after you opened it. Your entries are kept here and not saved yet. Saved now: ${changes
					.map(({ name, saved }) => `${name} “${saved}”`)
					.join(', ')}. Saving again replaces that by yours.`,

	saved: (name: string) => `${name} is saved.`,

	/** `2.0 current`, `revision 9 in review`, `draft open`: what the datasheet of a product is. */
	noDatasheet: () => 'none yet',
	productCount: (shown: number, total: number) =>
		shown === total ? count(total, 'product') : `${shown} of ${count(total, 'product')}`,
	dieCount: (total: number) => count(total, 'die', 'dies'),
	lotCount: (lots: number) => count(lots, 'lot')
};
