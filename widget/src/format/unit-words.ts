interface UnitWords {
  /** How the unit is read aloud. */
  readonly name: string;
  readonly written: readonly string[];
}

/** The ways people write a unit. All of one row mean the same; nothing is converted. */
const UNITS: readonly UnitWords[] = [
  { name: 'metres', written: ['m', 'metre', 'metres', 'meter', 'meters'] },
  { name: 'millimetres', written: ['mm', 'millimetre', 'millimetres', 'millimeter', 'millimeters'] },
  { name: 'centimetres', written: ['cm', 'centimetre', 'centimetres', 'centimeter', 'centimeters'] },
  { name: 'kilometres', written: ['km', 'kilometre', 'kilometres', 'kilometer', 'kilometers'] },
  { name: 'square metres', written: ['m2', 'sq m', 'sqm', 'square metre', 'square metres'] },
  { name: 'cubic metres', written: ['m3', 'cu m', 'cubic metre', 'cubic metres'] },
  { name: 'tonnes', written: ['t', 'tonne', 'tonnes'] },
  { name: 'kilograms', written: ['kg', 'kgs', 'kilo', 'kilos', 'kilogram', 'kilograms'] },
  { name: 'grams', written: ['g', 'gram', 'grams'] },
  { name: 'litres', written: ['l', 'litre', 'litres', 'liter', 'liters'] },
  { name: 'hours', written: ['h', 'hr', 'hrs', 'hour', 'hours'] },
  { name: 'minutes', written: ['min', 'mins', 'minute', 'minutes'] },
  { name: 'seconds', written: ['s', 'sec', 'secs', 'second', 'seconds'] },
  { name: 'days', written: ['d', 'day', 'days'] },
  { name: 'years', written: ['y', 'yr', 'yrs', 'year', 'years'] },
  { name: 'kilowatts', written: ['kw', 'kilowatt', 'kilowatts'] },
  { name: 'per cent', written: ['%', 'percent', 'per cent'] },
];

export function isSameUnit(typed: string, unit: string): boolean {
  const left = plain(typed);
  const right = plain(unit);
  return left === right || UNITS.some(({ written }) => written.includes(left) && written.includes(right));
}

/** "metres" for "m"; a unit that is not known is read as it is written. */
export function unitInWords(unit: string): string {
  return UNITS.find(({ written }) => written.includes(plain(unit)))?.name ?? unit;
}

/** NFKC turns "m²" into "m2". */
function plain(unit: string): string {
  return unit.normalize('NFKC').trim().toLowerCase().replace(/\.$/, '').replace(/\s+/g, ' ');
}
