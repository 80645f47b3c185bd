import { extname, join } from 'node:path';
import pLimit from 'p-limit';
import type { components } from '../../../../openapi/types/desk';
import { DeskError } from '../../errors';
import { kindWords } from '../kind-words';
import { Remembered } from '../looking/remembered';
import type { RecordsStore } from '../records-store';
import { revisionWithRows, withRowsOf } from '../required-rows';
import { answerOfThread } from '../worker-answer';
import type { FindingsOutcome, FindingsTask } from './findings-task';

export interface FindingsParts {
  readonly records: RecordsStore;
  readonly databasePath: string;
  /** Node's own arguments for the searching thread; none when compiled. */
  readonly threadArguments: readonly string[];
}

/** Compiled beside this file, or its TypeScript source where this file is one. */
const workerPath = join(__dirname, `findings-worker${extname(__filename)}`);

/** Row numbers that remembered findings may list in their steps, over all revisions. */
const rememberedRows = 3_000_000;

function weightOf(findings: FindingsOutcome): number {
  const steps = findings.flatMap((finding) => finding.steps ?? []);
  return steps.reduce((total, step) => total + ('rows' in step ? (step.rows?.length ?? 0) : 0), 10_000);
}

export class FindingsService {
  private readonly queue = pLimit(1);
  private readonly known = new Remembered<FindingsOutcome>(rememberedRows, weightOf);

  constructor(private readonly parts: FindingsParts) {}

  async list(revisionId: string, target: string | undefined): Promise<components['schemas']['RecordFindings']> {
    await revisionWithRows(this.parts.records, revisionId);
    if (target !== undefined) await this.requireNumeric(revisionId, target);
    const found = await this.search(revisionId, target ?? null);
    const items = found.map(({ where = null, steps = [], ...finding }) => ({
      ...finding,
      ...{ columns: [...finding.columns], rows: [...finding.rows], where, steps: [...steps] },
    }));
    return { revisionId, target: target ?? null, items };
  }

  private async requireNumeric(revisionId: string, target: string): Promise<void> {
    const column = (await this.parts.records.columnsOf(revisionId)).find(({ name }) => name === target);
    if (column?.kind === 'numeric') return;
    const what = column ? `${target} is a column of kind ${kindWords[column.kind]}` : `There is no column ${target}`;
    throw new DeskError('request-invalid', `${what}. Name one of kind Number as the target.`);
  }

  private search(revisionId: string, target: string | null): Promise<FindingsOutcome> {
    return this.known.get([revisionId, target], () =>
      this.queue(() => this.searchInThread({ databasePath: this.parts.databasePath, revisionId, target })),
    );
  }

  private searchInThread(task: FindingsTask): Promise<FindingsOutcome> {
    const { records, threadArguments } = this.parts;
    return withRowsOf(records, [task.revisionId], () => answerOfThread(workerPath, task, threadArguments));
  }
}
