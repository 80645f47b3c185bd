/** A conversion by name. */
export interface UnitConversion {
  readonly name: string;
  readonly factor: number;
  /** The unit afterwards; undefined where the unit stays. */
  readonly unit?: string;
}

/** Exact by definition: 1 ft = 0.3048 m, 1 lb = 0.45359237 kg, 1 in = 25.4 mm (international yard and pound agreement, 1959). */
const FOOT_METRES = 0.3048;
const POUND_KILOGRAMS = 0.45359237;
const INCH_MILLIMETRES = 25.4;

export const UNIT_CONVERSIONS: readonly UnitConversion[] = [
  { name: 'feet to metres', factor: FOOT_METRES, unit: 'm' },
  { name: 'metres to feet', factor: 1 / FOOT_METRES, unit: 'ft' },
  { name: 'pounds to kilograms', factor: POUND_KILOGRAMS, unit: 'kg' },
  { name: 'kilograms to pounds', factor: 1 / POUND_KILOGRAMS, unit: 'lb' },
  { name: 'inches to millimetres', factor: INCH_MILLIMETRES, unit: 'mm' },
  { name: 'millimetres to inches', factor: 1 / INCH_MILLIMETRES, unit: 'in' },
  { name: 'tonnes to kilograms', factor: 1000, unit: 'kg' },
  { name: 'kilograms to tonnes', factor: 0.001, unit: 't' },
  { name: 'centimetres to metres', factor: 0.01, unit: 'm' },
  { name: 'metres to centimetres', factor: 100, unit: 'cm' },
  { name: 'millimetres to metres', factor: 0.001, unit: 'm' },
  { name: 'metres to millimetres', factor: 1000, unit: 'mm' },
  { name: 'decimal mark one place to the left', factor: 0.1 },
  { name: 'decimal mark one place to the right', factor: 10 },
];

/** `0.3048`, `3.28084`: as many digits as tell one factor from another. */
export function factorText(factor: number): string {
  return String(Number(factor.toPrecision(6)));
}
