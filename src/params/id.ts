import type { ParamMatcher } from '@sveltejs/kit';

/** The id of a row: a whole number from 1, as SQLite gives them. */
export const match: ParamMatcher = (param) => /^[1-9]\d{0,14}$/.test(param);
