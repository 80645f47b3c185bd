import { Component, computed, input, linkedSignal } from '@angular/core';
import type { IncomingFile, ReadingProposal } from '../../api/contract';
import { Field, FieldInput } from '../../ui/field';
import { BytesPipe } from '../../ui/figure-pipes';
import { MomentPipe } from '../../ui/moment-pipes';
import { marksComplaint, marksOf, marksText } from './missing-marks';
import { ProposedReading } from './proposed-reading';
import type { FileChange } from './reading-choices';
import { DECIMAL_MARKS, DELIMITERS } from './reading-words';
import { basisWords } from './seen-words';

const LAST_HEADER_LINE = 1000;

/** The file, and how it is read as a whole. */
@Component({
  selector: 'tb-file-reading',
  imports: [BytesPipe, Field, FieldInput, MomentPipe],
  templateUrl: './file-reading.html',
  styleUrl: './file-reading.scss',
})
export class FileReading {
  readonly file = input.required<IncomingFile>();
  readonly reading = input.required<ProposedReading>();
  readonly proposal = input.required<ReadingProposal>();

  protected readonly delimiters = DELIMITERS;
  protected readonly decimalMarks = DECIMAL_MARKS;
  /** What is chosen; what was found where nothing is. */
  protected readonly current = computed(() => ({ ...this.proposal().choices, ...this.reading().choices() }));
  protected readonly marks = computed(() => marksText(this.current().missingMarks ?? []));
  protected readonly isWorkbook = computed(() => this.proposal().fileKind === 'workbook');
  protected readonly basis = computed(() => basisWords(this.proposal()));
  /** Complaints about what was typed, which was therefore not asked about. */
  private readonly headerLineComplaint = linkedSignal<unknown, string | undefined>({
    source: this.current,
    computation: () => undefined,
  });
  private readonly marksTypedComplaint = linkedSignal<unknown, string | undefined>({
    source: this.current,
    computation: () => undefined,
  });

  protected complaintAbout(field: keyof FileChange): string | undefined {
    const typed = { headerLine: this.headerLineComplaint(), missingMarks: this.marksTypedComplaint() };
    return (field in typed ? typed[field as keyof typeof typed] : undefined) ?? this.reading().complaints().get(field);
  }

  protected chooseDelimiter(value: string): void {
    const delimiter = DELIMITERS.find((option) => option.value === value)?.value;
    this.reading().changeFile({ delimiter });
  }

  protected chooseDecimal(value: string): void {
    this.reading().changeFile({ decimal: DECIMAL_MARKS.find((option) => option.value === value)?.value });
  }

  protected typeHeaderLine(text: string): void {
    const headerLine = Number(text);
    if (!Number.isInteger(headerLine) || headerLine < 1 || headerLine > LAST_HEADER_LINE)
      return this.headerLineComplaint.set(`Enter a whole number from 1 to ${LAST_HEADER_LINE}`);
    this.headerLineComplaint.set(undefined);
    this.reading().changeFile({ headerLine });
  }

  protected typeMarks(text: string): void {
    const missingMarks = [...marksOf(text)];
    const complaint = marksComplaint(missingMarks);
    this.marksTypedComplaint.set(complaint);
    if (complaint === undefined) this.reading().changeFile({ missingMarks });
  }
}
