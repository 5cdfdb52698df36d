/**
 * Branded numbers for the borders between stages: a value in nanometres cannot be passed for one in
 * millimetres. Brands vanish at run time; arithmetic drops them, so re-brand on purpose.
 */
declare const unit: unique symbol;
type Branded<Name extends string> = number & { readonly [unit]: Name };

export type Millimetres = Branded<'mm'>;
export type Nanometres = Branded<'nm'>;
export type Watts = Branded<'W'>;
export type Radians = Branded<'rad'>;
export type MolesPerLitre = Branded<'mol/L'>;
export type PerMillimetre = Branded<'1/mm'>;
/** A share between 0 and 1. */
export type Fraction = Branded<'fraction'>;

export const mm = (value: number): Millimetres => value as Millimetres;
export const nm = (value: number): Nanometres => value as Nanometres;
export const watts = (value: number): Watts => value as Watts;
export const radians = (value: number): Radians => value as Radians;
export const molesPerLitre = (value: number): MolesPerLitre => value as MolesPerLitre;
export const perMillimetre = (value: number): PerMillimetre => value as PerMillimetre;
export const fraction = (value: number): Fraction => value as Fraction;
