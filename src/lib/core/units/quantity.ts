declare const unit: unique symbol;

/** A number that carries its SI unit in the type, and nothing at run time. */
export type Quantity<Unit extends string> = number & { readonly [unit]: Unit };

export type Volts = Quantity<'V'>;
export type Farads = Quantity<'F'>;
export type Hertz = Quantity<'Hz'>;
export type SquareMetres = Quantity<'m²'>;

export const volts = (value: number): Volts => value as Volts;
export const farads = (value: number): Farads => value as Farads;
export const hertz = (value: number): Hertz => value as Hertz;
export const squareMetres = (value: number): SquareMetres => value as SquareMetres;
