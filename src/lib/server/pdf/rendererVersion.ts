/**
 * Changes whenever the same document and record would give other bytes: with the layout, the
 * faces, or the library that writes the file.
 */
export const rendererVersion = 'platen-pdf-2';
