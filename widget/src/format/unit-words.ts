/** The ways people write a unit. All of one row mean the same; nothing is converted. */
const SAME_UNIT: readonly (readonly string[])[] = [
  ['m', 'metre', 'metres', 'meter', 'meters'],
  ['mm', 'millimetre', 'millimetres', 'millimeter', 'millimeters'],
  ['cm', 'centimetre', 'centimetres', 'centimeter', 'centimeters'],
  ['km', 'kilometre', 'kilometres', 'kilometer', 'kilometers'],
  ['m2', 'sq m', 'sqm', 'square metre', 'square metres'],
  ['m3', 'cu m', 'cubic metre', 'cubic metres'],
  ['t', 'tonne', 'tonnes'],
  ['kg', 'kgs', 'kilo', 'kilos', 'kilogram', 'kilograms'],
  ['g', 'gram', 'grams'],
  ['l', 'litre', 'litres', 'liter', 'liters'],
  ['h', 'hr', 'hrs', 'hour', 'hours'],
  ['min', 'mins', 'minute', 'minutes'],
  ['s', 'sec', 'secs', 'second', 'seconds'],
  ['d', 'day', 'days'],
  ['y', 'yr', 'yrs', 'year', 'years'],
  ['kw', 'kilowatt', 'kilowatts'],
  ['%', 'percent', 'per cent'],
];

export function isSameUnit(typed: string, unit: string): boolean {
  const left = plain(typed);
  const right = plain(unit);
  return left === right || SAME_UNIT.some((words) => words.includes(left) && words.includes(right));
}

/** NFKC turns "m²" into "m2". */
function plain(unit: string): string {
  return unit.normalize('NFKC').trim().toLowerCase().replace(/\.$/, '').replace(/\s+/g, ' ');
}
