/**
 * Raised whenever a limit, its derivation or its refusal can come out differently for the same
 * inputs. Stored limits are kept under it, and a datasheet's evidence names it.
 */
export const engineVersion = '2.0.0';
