import { NumberClass, type NumberReader } from './number-cell';
import { unitNamed, type Unit } from './units';

/** A number, then a unit that begins with a letter or a per cent sign. No letters in the number: `A12` is a name. */
const pattern = /^([^\p{L}%‰]*\d[^\p{L}%‰]*)([\p{L}%‰][\p{L}\s.]*[23²³]?)$/u;
const longestUnitCell = 60;

/** Suffixes are few and come back; the bound keeps a column of remarks from filling memory. */
const rememberedSuffixes = 1000;

/**
 * Reads cells such as `12 m` or `3,5t`: `read` answers the class of the number and leaves its value in the number
 * reader and its unit in `unit`; `none` when there is no number with a unit that is known.
 */
export class UnitReader {
  unit: Unit | null = null;
  private readonly suffixes = new Map<string, Unit | null>();

  constructor(private readonly numbers: NumberReader) {}

  read(text: string): NumberClass {
    this.unit = null;
    if (text.length > longestUnitCell) return NumberClass.none;
    const parts = pattern.exec(text.trim());
    if (!parts) return NumberClass.none;
    const unit = this.unitOf(parts[2]);
    if (!unit) return NumberClass.none;
    const numberClass = this.numbers.read(parts[1].trim());
    if (numberClass !== NumberClass.none) this.unit = unit;
    return numberClass;
  }

  private unitOf(suffix: string): Unit | null {
    const known = this.suffixes.get(suffix);
    if (known !== undefined) return known;
    const unit = unitNamed(suffix);
    if (this.suffixes.size < rememberedSuffixes) this.suffixes.set(suffix, unit);
    return unit;
  }
}
