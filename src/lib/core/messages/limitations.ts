/** Where a limit carries less confidence than it states; the numbers come from `npm run confidence`. */
export const limitationMessages = {
	pooledLots: () =>
		'Lots are pooled as if they were one: where 3 lots of 25 devices carry 30 % of the variance, “95 %” is about 70 %, and 50 % where they carry 60 %. The method “lots” keeps its confidence.',
	lotsBesideTheLine: () =>
		'The line takes devices as independent: where lots lie beside it and carry 30 % of the residual variance, “95 %” is about 72 %.',
	veryUnequalLots: () =>
		'The lots are of very unequal size. Where such lots hardly differ, 12 lots of 150, 5 and 2 devices keep 92 % to 94 % instead of 95 %: a lot of two counts as much as one of 150. Measure more devices of the small lots.'
};
