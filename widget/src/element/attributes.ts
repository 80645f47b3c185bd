import { knownLocale } from '../format/number-format';

/**
 * The contract of `<tarebeam-form>`. An attribute that is changed later takes effect at once; each is also a property
 * (`heading-level` is `headingLevel`).
 *
 * | attribute       | value                                | default                       | what it does |
 * |---|---|---|---|
 * | `estimator`     | name, e.g. `refit-labour`            | required                      | which estimator the form asks |
 * | `key`           | embed key                            | required                      | public; works only from the sites listed for it at the desk |
 * | `service`       | address, e.g. `https://desk.example` | required                      | where the desk answers |
 * | `locale`        | language tag, e.g. `de-AT`           | `lang` of the page around it  | how numbers and dates are written, and which decimal separator is expected; both are read |
 * | `heading`       | text                                 | the estimator's name          | heading of the form; empty for none |
 * | `heading-level` | 1 to 5                               | 2                             | level of that heading in the page's outline; those below it follow |
 * | `show-beam`     | `yes` or `no`                        | `yes`                         | whether the answer shows what moved it (beam diagram and its table) |
 * | `nonce`         | nonce of the page's policy           | that of the loading script    | put on the style elements; read once, from the first form of the page |
 *
 * | event               | `detail`                                   | when |
 * |---|---|---|
 * | `tarebeam-estimate` | `{ estimate, inputs }`                     | an estimate that a person asked for has been answered |
 * | `tarebeam-error`    | `{ code, message, status?, requestId?, retryAfterSeconds? }` | what a person asked for could not be answered |
 *
 * Both bubble and cross shadow roots.
 *
 * | custom property        | default                   | what it colours or sets |
 * |---|---|---|
 * | `--tarebeam-font`      | the page's                | font family |
 * | `--tarebeam-ink`       | the page's text colour    | text |
 * | `--tarebeam-muted`     | ink, weakened             | hints, captions |
 * | `--tarebeam-rule`      | ink, faint                | rules |
 * | `--tarebeam-field`     | transparent               | ground of fields |
 * | `--tarebeam-ground`    | transparent               | ground of the whole form |
 * | `--tarebeam-accent`    | `#8A5F12`                 | button, focus, pivot |
 * | `--tarebeam-on-accent` | `#FFFFFF`                 | text on the button |
 * | `--tarebeam-error`     | `#9B3A34` with some ink   | wrong entries |
 * | `--tarebeam-notice`    | `#B07A1E`                 | edge of notices and flags |
 * | `--tarebeam-radius`    | `3px`                     | corners |
 * | `--tarebeam-raises`    | `#D8BC78`                 | weights that raise the estimate, the interval's bar |
 * | `--tarebeam-lowers`    | `#E8E4D9`                 | weights that lower it |
 *
 * Parts: `base`, `loading`, `failure`, `heading`, `description`, `error-summary`, `form`, `field`, `label`, `hint`, `error`,
 * `notice`, `control`, `input`, `radio`, `unit`, `button`, `result`, `value`, `interval`, `flags`, `beam`, `cautions`,
 * `reference`, `copy-button`, `print-button`.
 */
export interface TarebeamFormAttributes {
  estimator: string;
  key: string;
  service: string;
  locale: string | undefined;
  heading: string | null;
  headingLevel: number;
  showBeam: boolean;
}

export const TAG_NAME = 'tarebeam-form';

/** Attributes arrive as text, or as null once they are removed; properties as whatever the page's script gives. */
export function textFrom(value: unknown): string {
  return typeof value === 'string' ? value.trim() : '';
}

export function headingFrom(value: unknown): string | null {
  return typeof value === 'string' ? value.trim() : null;
}

export function localeFrom(value: unknown): string | undefined {
  return typeof value === 'string' ? knownLocale(value) : undefined;
}

export function headingLevelFrom(value: unknown): number {
  const level = Number(value ?? NaN);
  return Number.isInteger(level) && level >= 1 && level <= 5 ? level : 2;
}

/** On unless it is said not to be. */
export function switchFrom(value: unknown): boolean {
  return !(
    value === false ||
    (typeof value === 'string' && ['no', 'false', 'off'].includes(value.trim().toLowerCase()))
  );
}
