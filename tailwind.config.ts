import type { Config } from 'tailwindcss';

/** The design tokens. Each colour is a CSS variable, so that light, dark and charts read one source. */
export default {
	theme: {
		colors: {
			transparent: 'transparent',
			current: 'currentColor',
			paper: 'var(--paper)',
			sheet: 'var(--sheet)',
			rule: 'var(--rule)',
			'rule-strong': 'var(--rule-strong)',
			ink: 'var(--ink)',
			'ink-soft': 'var(--ink-soft)',
			verdigris: 'var(--verdigris)',
			'on-verdigris': 'var(--on-verdigris)',
			cobalt: 'var(--cobalt)',
			vermilion: 'var(--vermilion)',
			ochre: 'var(--ochre)',
			wash: 'var(--wash)',
			'wash-vermilion': 'var(--wash-vermilion)',
			'wash-ochre': 'var(--wash-ochre)',
			band: 'var(--band)',
			sweep: 'var(--sweep)',
			board: 'var(--board)',
			'proof-paper': 'var(--proof-paper)'
		},
		fontFamily: {
			sans: ["'Source Sans 3'", 'system-ui', 'sans-serif'],
			slab: ["'Roboto Slab'", 'Georgia', 'serif']
		},
		fontSize: {
			'12': ['0.75rem', { lineHeight: '1.0625rem' }],
			'14': ['0.875rem', { lineHeight: '1.25rem' }],
			'16': ['1rem', { lineHeight: '1.45rem' }],
			'20': ['1.25rem', { lineHeight: '1.6rem' }],
			'28': ['1.75rem', { lineHeight: '2.1rem' }]
		},
		borderRadius: { none: '0', DEFAULT: '2px' },
		spacing: {
			'0': '0',
			px: '1px',
			'1': '4px',
			'2': '8px',
			'3': '12px',
			'4': '16px',
			'6': '24px',
			'8': '32px',
			'12': '48px'
		}
	}
} satisfies Config;
