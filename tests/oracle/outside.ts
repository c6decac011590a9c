import { identifier, quantity, type Outside } from './check';

const CONSTANT = 'a constant of nature that no formula of Platen needs';
const NORMALITY = 'a test of normality that Platen does not offer: it offers Anderson–Darling';
const LIKELIHOOD =
	'restricted or full likelihood: Platen estimates components by analysis of variance';

/** What Platen does not compute, one line of reason each. */
export const OUTSIDE: readonly Outside[] = [
	{
		reason: 'an approximation of a factor; Platen has the exact one',
		covers: (row) =>
			quantity('A', "Natrella's", 'Natrella b')(row) ||
			identifier(/^B-(howe|pub-NIST-interval)/)(row)
	},
	{
		reason: 'the error of another program’s routine, quoted as a warning',
		covers: identifier(/^A-warn-R-ncp$/)
	},
	{
		reason: 'Vangel’s method for lots: Platen uses generalized variables and, second, Mee–Owen',
		covers: (row) => row.inputs['method'] === 'Vangel' || row.id === 'D-pub-CMH17-ETW2-B'
	},
	{
		reason: LIKELIHOOD,
		covers: identifier(
			/^E-(oxide-(reml_logLik|ml_|src_)|pb-oxide-REML|pastes-reml-logLik|dyestuff2?-ml_|oxide_unbalanced-(reml|fixed))/
		)
	},
	{
		reason: NORMALITY,
		covers: quantity('F', 'Shapiro-Wilk', "D'Agostino", 'CMH-17 observed', 'same, on ln(x)')
	},
	{
		reason: 'a measure of shape that Platen does not show: it shows the moment skewness',
		covers: quantity('F', 'bias-corrected skewness', 'excess kurtosis')
	},
	{
		reason: 'a rule for outliers that Platen does not apply: its rule is the robust z of ln C',
		covers: quantity(
			'F',
			'interquartile range',
			'max |0.6745',
			'count of modified',
			'count outside Tukey',
			'two-sided Grubbs',
			'Grubbs statistic',
			'one-sided Grubbs',
			'static part-average',
			'modified z finds',
			'largest possible |x-mean|'
		)
	},
	{
		reason: 'a comparison of groups that Platen does not make: it shows the lot F test',
		covers: quantity('F', 'k-sample', 'sigma_N of', 'p-value of the same', 'Levene')
	},
	{
		reason: 'the row names a data set without its values',
		covers: (row) =>
			/^F-faithful_eruptions-(AD_A2|g1)$/.test(row.id) && row.inputs['data'] === undefined
	},
	{
		reason: 'another definition of a sample quantile: Platen has type 8',
		covers: (row) => row.quantity.startsWith('sample quantile') && !row.quantity.endsWith('type 8')
	},
	{
		reason: 'an index that Platen does not show: it shows Ppk',
		covers: identifier(/^G-nist-(Cp|k)$/)
	},
	{ reason: CONSTANT, covers: identifier(/^H-const-(h|m_e)$/) },
	{
		reason: 'a material constant: entered data with a source, and handbooks differ',
		covers: quantity('H', 'material parameter')
	},
	{
		reason: 'a material property computed from effective masses; Platen takes it as entered data',
		covers: quantity(
			'H',
			'free-electron Richardson',
			'A* = A0',
			'effective density of states',
			'Nc(T)/Nc(300)',
			'Si band gap'
		)
	},
	{
		reason: 'from doping to potential, field or width: Platen reads C–V curves the other way',
		covers: identifier(
			/^H-(neamen2-Vbi|neamen-W-(Vbi|xn|Emax)|neamen-pn-(Vbi|C)|jaeger-|uri-Vbi|wilson-|ge-alloy-|sze-onesided|sze-Cj-C|sze-linear|sze-WSi-phiB|bvz-|streetman-|grading-|lingraded|profile-V|pn-)/
		)
	},
	{
		reason: 'image-force lowering, which is not part of a barrier from C–V',
		covers: identifier(/^H-neamen-image/)
	},
	{
		reason: 'the exact majority-carrier tail, which changes nothing in reverse',
		covers: quantity('H', 'Schottky capacitance with the exact')
	},
	{
		reason: 'includes the diffusion capacitance of forward current',
		covers: quantity('I', 'SPICE diode capacitance at forward bias')
	},
	{
		reason: 'flicker noise, which no datasheet model needs',
		covers: identifier(/^I-default-(KF|AF)$/)
	},
	{
		reason: 'an uncertainty budget: Platen takes the tester’s expanded uncertainty as stated',
		covers: identifier(/^J-(gum|dist|deconvolve)/)
	},
	{
		reason: 'a decision rule of managed or global risk: Platen uses the guard band w = r·U',
		covers: identifier(/^J-(dobbert|global)/)
	},
	{
		reason: 'mean + k·s + w, a sum of numbers given',
		covers: identifier(/^J-widen-limit$/)
	},
	{
		reason: 'rounds a half to the even digit; Platen rounds it away from zero (rule B)',
		covers: identifier(/^J-iso80000-A-12\.25$/)
	},
	{ reason: 'preferred numbers, which no limit is set to', covers: identifier(/^J-(E24|R10|R5)/) },
	{
		reason: 'thermal or circuit arithmetic that Platen leaves to the designer',
		covers: identifier(
			/^K-(Ptot|derate|Tj|Ppulse|fc|freq-ratio|match|rs-parallel|ac-level|q101-total)/
		)
	},
	{
		reason: 'wording or scope of a standard, not a number',
		covers: (row) => row.area === 'K' && row.tolerance['match'] === 'text'
	},
	{
		reason:
			'Norde’s and Richardson’s plots: Platen has Cheung’s functions and the activation energy',
		covers: quantity(
			'L',
			'Norde',
			'Rs=(gamma-n)',
			'phiB = F(V0)',
			'Richardson plot',
			'intercept -> A A*'
		)
	},
	{
		reason: 'a rule of thumb from the activation energy, not printed',
		covers: quantity('L', 'temperature step that doubles')
	},
	{
		reason: 'an approximation of the factor on a line; Platen has the exact one',
		covers: quantity('M', 'two-sided factor, Wallis-type')
	},
	{
		reason: 'a simulated confidence: a run of the confidence table, not a value of a function',
		covers: quantity('M', 'Monte-Carlo confidence', 'same limit judged')
	}
];
