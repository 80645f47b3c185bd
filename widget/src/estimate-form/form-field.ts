/** One input of the estimator as a field of the form. */
export type FormField = NumberField | ChoiceField | DateField | TextField;

interface FieldBase {
  readonly name: string;
  readonly label: string;
  readonly help: string | null;
  /** What a blank field sends: nothing, or null where the input must be present; a required field may not be blank. */
  readonly blank: 'refused' | 'left-out' | 'null';
}

export interface NumberField extends FieldBase {
  readonly kind: 'number';
  readonly unit: string | null;
  readonly whole: boolean;
  readonly mayBeNegative: boolean;
  readonly least: Bound | null;
  readonly greatest: Bound | null;
  readonly recorded: Range<number> | null;
  /** Shown as "like 12.6" when what was typed is no number. */
  readonly example: number;
}

export interface Bound {
  readonly value: number;
  /** Whether the bound itself is allowed. */
  readonly inclusive: boolean;
}

export interface ChoiceField extends FieldBase {
  readonly kind: 'choice';
  readonly options: readonly ChoiceOption[];
  readonly shownAs: 'radios' | 'list';
}

export interface ChoiceOption {
  readonly text: string;
  readonly value: string | number | boolean;
}

export interface DateField extends FieldBase {
  readonly kind: 'date';
  /** ISO 8601 days. */
  readonly recorded: Range<string> | null;
}

export interface TextField extends FieldBase {
  readonly kind: 'text';
  readonly suggestions: readonly string[];
}

export interface Range<T> {
  readonly least: T;
  readonly greatest: T;
}
