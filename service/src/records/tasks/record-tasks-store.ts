import type { components } from '../../../../openapi/types/desk';
import type { Database } from '../../database/database';
import type { PersonName } from '../records-store';

type Task = components['schemas']['RecordTask'];
export type TaskKind = Task['kind'];
export type TaskState = Task['state'];
export type TaskProgress = components['schemas']['RecordTaskProgress'];
export type TaskProblem = components['schemas']['RecordTaskProblem'];

export interface NewTask {
  readonly id: string;
  readonly kind: TaskKind;
  readonly state: TaskState;
  readonly progress: TaskProgress;
  /** The revision that is being made. */
  readonly revisionId: string;
  readonly saidAt: string;
  readonly createdAt: string;
  readonly createdBy: string;
}

export interface TaskRecord extends Omit<NewTask, 'createdBy'> {
  readonly recordSetId: string | null;
  readonly problem: TaskProblem | null;
  readonly cancelAsked: boolean;
  /** The set that the revision belongs to, once there is one. */
  readonly madeIn: string | null;
  readonly createdBy: PersonName;
}

/** How far a task was at its end, and when that was. */
export interface TaskLastWord {
  readonly progress: TaskProgress;
  readonly saidAt: string;
}

export interface TaskEnd {
  readonly state: Extract<TaskState, 'done' | 'failed' | 'cancelled'>;
  readonly recordSetId: string | null;
  readonly problem: TaskProblem | null;
}

type TaskRow = Omit<TaskRecord, 'progress' | 'problem' | 'cancelAsked' | 'createdBy'> & {
  progress: string;
  problem: string | null;
  cancelAsked: boolean | number;
  createdBy: string;
  createdByName: string;
};

const underWay: readonly TaskState[] = ['queued', 'running'];

export class RecordTasksStore {
  constructor(private readonly database: Database) {}

  async insert(task: NewTask): Promise<void> {
    await this.database.connection('recordTasks').insert({ ...task, progress: JSON.stringify(task.progress) });
  }

  async find(id: string): Promise<TaskRecord | null> {
    const row = (await this.database
      .connection('recordTasks')
      .join('people', 'people.id', 'recordTasks.createdBy')
      .leftJoin('recordRevisions', 'recordRevisions.id', 'recordTasks.revisionId')
      .where('recordTasks.id', id)
      .first('recordTasks.*', 'people.name as createdByName', 'recordRevisions.recordSetId as madeIn')) as
      TaskRow | undefined;
    return row ? toTask(row) : null;
  }

  /** Says that the work goes on, and answers whether somebody has asked to cancel it. */
  async say(id: string, state: TaskState, progress: TaskProgress, saidAt: string): Promise<boolean> {
    const { connection } = this.database;
    await connection('recordTasks')
      .where({ id })
      .whereIn('state', underWay)
      .update({ state, progress: JSON.stringify(progress), saidAt });
    const row = (await connection('recordTasks').where({ id }).first('cancelAsked')) as
      { cancelAsked: boolean | number } | undefined;
    return Boolean(row?.cancelAsked);
  }

  /** False when the task had ended already. */
  async askToCancel(id: string): Promise<boolean> {
    const changed = await this.database
      .connection('recordTasks')
      .where({ id })
      .whereIn('state', underWay)
      .update({ cancelAsked: true });
    return changed > 0;
  }

  async end(id: string, end: TaskEnd, { progress, saidAt }: TaskLastWord): Promise<void> {
    const problem = end.problem && JSON.stringify(end.problem);
    await this.database
      .connection('recordTasks')
      .where({ id })
      .whereIn('state', underWay)
      .update({ ...end, problem, progress: JSON.stringify(progress), saidAt });
  }

  async removeBefore(time: string): Promise<void> {
    await this.database.connection('recordTasks').where('saidAt', '<', time).delete();
  }
}

function toTask({ createdByName, ...row }: TaskRow): TaskRecord {
  return {
    ...row,
    progress: JSON.parse(row.progress) as TaskProgress,
    problem: row.problem === null ? null : (JSON.parse(row.problem) as TaskProblem),
    cancelAsked: Boolean(row.cancelAsked),
    createdBy: { id: row.createdBy, name: createdByName },
  };
}
