import type { ColumnKind, DateOrder, ProposedColumn, ReadingChoices } from '../../api/contract';
import { marksText } from './missing-marks';
import { ColumnChange, columnChoice, columnPlace } from './reading-choices';
import type { ChoiceComplaints } from './reading-complaints';
import { seenWords, wantsALook } from './seen-words';

/** Whose word counts for a column when the file is appended to a revision. */
export type AppendingPart = 'revision' | 'additional';

/** A column of the file as the table shows it: what is chosen, and what was found where nothing is. */
export interface ColumnRow {
  readonly name: string;
  readonly position: number;
  readonly kind: ColumnKind;
  readonly unit: string;
  /** Also where a chosen unit made words of the column, so that it can be chosen otherwise. */
  readonly asksUnit: boolean;
  readonly dateOrder: DateOrder | null;
  readonly marks: string;
  readonly setAside: boolean;
  readonly seen: readonly string[];
  readonly suspectMarks: ProposedColumn['suspectMarks'];
  readonly doubts: readonly string[];
  readonly wantsALook: boolean;
  readonly isChanged: boolean;
  /** Undefined where the file is not appended. */
  readonly part?: AppendingPart;
  readonly complaints: Readonly<Partial<Record<keyof ColumnChange, string>>>;
}

const FIELDS: readonly (keyof ColumnChange)[] = ['kind', 'unit', 'dateOrder', 'missingMarks', 'setAside'];

export function columnRow(
  column: ProposedColumn,
  choices: ReadingChoices,
  complaints: ChoiceComplaints,
  additional: ReadonlySet<string> | undefined,
): ColumnRow {
  const { name, position, suspectMarks, doubts } = column;
  const choice = columnChoice(choices, name);
  const setAside = choice?.setAside ?? column.setAside;
  const kind = choice?.kind ?? column.kind;
  return {
    ...{ name, position, suspectMarks, doubts, setAside },
    kind,
    asksUnit: kind === 'numeric' || (Boolean(choice?.unit) && choice?.kind === undefined),
    unit: (choice?.unit === undefined ? column.unit : choice.unit) ?? '',
    dateOrder: choice?.dateOrder ?? column.dateOrder,
    marks: marksText(choice?.missingMarks ?? column.missingMarks),
    seen: seenWords(column),
    wantsALook: !setAside && wantsALook(column),
    isChanged: choice !== undefined,
    part: additional && (additional.has(name) ? 'additional' : 'revision'),
    complaints: Object.fromEntries(FIELDS.map((field) => [field, complaints.get(columnPlace(name, field))])),
  };
}
