import { extname, join } from 'node:path';
import pLimit from 'p-limit';
import type { components } from '../../../../openapi/types/desk';
import { DeskError, notFound } from '../../errors';
import type { RecordsStore } from '../records-store';
import { requireRows } from '../required-rows';
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

/** Searches whose outcome is remembered: a revision never changes, so neither does what is found in it. */
const remembered = 50;

export class FindingsService {
  private readonly queue = pLimit(1);
  private readonly known = new Map<string, Promise<FindingsOutcome>>();

  constructor(private readonly parts: FindingsParts) {}

  async list(revisionId: string, target: string | undefined): Promise<components['schemas']['RecordFindings']> {
    const revision = await this.parts.records.findRevision(revisionId);
    if (!revision) throw notFound('revision');
    requireRows(revision);
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
    const what = column ? `${target} is a column of kind ${column.kind}` : `There is no column ${target}`;
    throw new DeskError('request-invalid', `${what}. Name a numeric column as the target.`);
  }

  private search(revisionId: string, target: string | null): Promise<FindingsOutcome> {
    const key = JSON.stringify([revisionId, target]);
    const known = this.known.get(key);
    if (known) return known;
    const searched = this.queue(() =>
      this.searchInThread({ databasePath: this.parts.databasePath, revisionId, target }),
    );
    this.known.set(key, searched);
    searched.catch(() => this.known.delete(key));
    const [oldest] = this.known.keys();
    if (this.known.size > remembered) this.known.delete(oldest);
    return searched;
  }

  private searchInThread(task: FindingsTask): Promise<FindingsOutcome> {
    return answerOfThread(workerPath, task, this.parts.threadArguments);
  }
}
