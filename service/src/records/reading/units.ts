/** What a unit measures; readings are converted only within one of these. */
export type Dimension = 'length' | 'area' | 'volume' | 'mass' | 'time' | 'ratio';

export interface Unit {
  readonly symbol: string;
  readonly dimension: Dimension;
  /** How many of the dimension's smallest step it is: a whole number below 2^53, so that conversions are exact. */
  readonly steps: number;
}

interface UnitWords {
  readonly symbol: string;
  readonly steps: number;
  /** Other spellings, compared letter for letter: `Mg` is not `mg`. */
  readonly written?: readonly string[];
  /** Words, compared without regard to case. */
  readonly words?: readonly string[];
}

/**
 * Exact definitions. Metric units, litre, tonne, minute, hour and day: SI Brochure (BIPM, 9th edition 2019), tables 7
 * and 8. Inch 25.4 mm, foot 0.3048 m, yard 0.9144 m, mile 1609.344 m and pound 0.453 592 37 kg: international yard and
 * pound agreement (1959). Nautical mile 1852 m: First International Extraordinary Hydrographic Conference (Monaco
 * 1929). Left out because the word alone does not tell which is meant: ton, ounce, gallon, pint, `M`, `T`, `'`, `"`.
 */
const table: Readonly<Record<Dimension, readonly UnitWords[]>> = {
  // In micrometres.
  length: [
    { symbol: 'µm', steps: 1, written: ['μm', 'um'] },
    { symbol: 'mm', steps: 1e3, written: ['MM'], words: ['millimetre', 'millimetres', 'millimeter', 'millimeters'] },
    {
      symbol: 'cm',
      steps: 1e4,
      written: ['CM', 'Cm'],
      words: ['centimetre', 'centimetres', 'centimeter', 'centimeters'],
    },
    { symbol: 'm', steps: 1e6, words: ['metre', 'metres', 'meter', 'meters'] },
    { symbol: 'km', steps: 1e9, written: ['KM', 'Km'], words: ['kilometre', 'kilometres', 'kilometer', 'kilometers'] },
    { symbol: 'in', steps: 25_400, words: ['in', 'in.', 'inch', 'inches'] },
    { symbol: 'ft', steps: 304_800, words: ['ft', 'ft.', 'foot', 'feet'] },
    { symbol: 'yd', steps: 914_400, words: ['yd', 'yds', 'yard', 'yards'] },
    { symbol: 'mi', steps: 1_609_344_000, words: ['mi', 'mile', 'miles'] },
    { symbol: 'nmi', steps: 1_852_000_000, words: ['nmi', 'nautical mile', 'nautical miles'] },
  ],
  // In square tenths of a millimetre: an inch is 254 of them.
  area: [
    { symbol: 'mm²', steps: 100, written: ['mm2'] },
    { symbol: 'cm²', steps: 10_000, written: ['cm2'] },
    { symbol: 'm²', steps: 1e8, written: ['m2', 'sqm', 'sq m'] },
    { symbol: 'ft²', steps: 3048 ** 2, written: ['ft2', 'sqft', 'sq ft'] },
    { symbol: 'in²', steps: 254 ** 2, written: ['in2', 'sq in'] },
  ],
  // In cubic tenths of a millimetre.
  volume: [
    {
      symbol: 'ml',
      steps: 1e6,
      written: ['mL', 'cm³', 'cm3', 'ccm'],
      words: ['millilitre', 'millilitres', 'milliliter', 'milliliters'],
    },
    { symbol: 'cl', steps: 1e7, written: ['cL'] },
    { symbol: 'dl', steps: 1e8, written: ['dL'] },
    { symbol: 'l', steps: 1e9, written: ['L', 'ltr', 'dm³', 'dm3'], words: ['litre', 'litres', 'liter', 'liters'] },
    { symbol: 'hl', steps: 1e11, written: ['hL'] },
    { symbol: 'm³', steps: 1e12, written: ['m3', 'cbm'] },
    { symbol: 'ft³', steps: 3048 ** 3, written: ['ft3', 'cu ft'] },
    { symbol: 'in³', steps: 254 ** 3, written: ['in3', 'cu in'] },
  ],
  // In hundredths of a milligram.
  mass: [
    { symbol: 'mg', steps: 1e2 },
    { symbol: 'g', steps: 1e5, words: ['gram', 'grams', 'gramme', 'grammes'] },
    { symbol: 'kg', steps: 1e8, written: ['KG', 'Kg', 'kgs'], words: ['kilogram', 'kilograms', 'kilo', 'kilos'] },
    { symbol: 't', steps: 1e11, words: ['tonne', 'tonnes'] },
    { symbol: 'lb', steps: 45_359_237, words: ['lb', 'lbs', 'lb.', 'lbs.', 'pound', 'pounds'] },
  ],
  // In milliseconds.
  time: [
    { symbol: 'ms', steps: 1 },
    { symbol: 's', steps: 1e3, words: ['sec', 'secs', 'second', 'seconds'] },
    { symbol: 'min', steps: 60_000, words: ['min', 'mins', 'min.', 'minute', 'minutes'] },
    { symbol: 'h', steps: 3_600_000, words: ['hr', 'hrs', 'hour', 'hours'] },
    { symbol: 'd', steps: 86_400_000, words: ['day', 'days'] },
    { symbol: 'week', steps: 604_800_000, words: ['weeks', 'wk', 'wks'] },
  ],
  // In thousandths.
  ratio: [
    { symbol: '‰', steps: 1 },
    { symbol: '%', steps: 10, words: ['percent', 'per cent', 'pct'] },
  ],
};

const exactly = new Map<string, Unit>();
const byWord = new Map<string, Unit>();
for (const [dimension, units] of Object.entries(table) as [Dimension, readonly UnitWords[]][]) {
  for (const { symbol, steps, written = [], words = [] } of units) {
    const unit: Unit = { symbol, dimension, steps };
    for (const spelling of [symbol, ...written]) exactly.set(spelling, unit);
    for (const word of words) byWord.set(word, unit);
  }
}

/** The known unit of a symbol or word, however its inner spaces are; null for any other. */
export function unitNamed(text: string): Unit | null {
  const plain = text.trim().replace(/\s+/g, ' ');
  return exactly.get(plain) ?? byWord.get(plain.toLowerCase()) ?? null;
}

export const areConvertible = (one: Unit, other: Unit): boolean => one.dimension === other.dimension;

const greatestCommonDivisor = (a: number, b: number): number => (b === 0 ? a : greatestCommonDivisor(b, a % b));

/** Multiplies before it divides, both by whole numbers: 57 cm are 0.57 m and not 0.5700000000000001 m. */
export interface Conversion {
  readonly multiplier: number;
  readonly divisor: number;
}

export function conversionOf(from: Unit, to: Unit): Conversion {
  const common = greatestCommonDivisor(from.steps, to.steps);
  return { multiplier: from.steps / common, divisor: to.steps / common };
}

export const converted = (value: number, { multiplier, divisor }: Conversion): number => (value * multiplier) / divisor;
