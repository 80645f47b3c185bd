import { rmSync, mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { addRevision, uniformNumbers } from '../../../../test/support/record-fixture';
import { fitThreadArguments, startTestService, type TestService } from '../../../../test/support/test-service';
import { databasePathOf } from '../../compose';
import { finishTable } from '../mending/finish-table';
import { SpillFile } from '../reading/spill-file';
import { appendInThread } from './append-thread';
import type { AppendTask } from './append-task';
import { readSpilledColumn } from './append-table';

describe('appending in a thread', () => {
  const lengths = uniformNumbers(50, 7);
  const folder = mkdtempSync(join(tmpdir(), 'tarebeam-append-'));
  const options = { nodeArguments: fitThreadArguments };
  let service: TestService;
  let task: AppendTask;

  beforeAll(async () => {
    service = await startTestService();
    const person = await service.addPerson(['analyst']);
    const baseRevisionId = await addRevision(service, person, [
      { name: 'length', unit: 'm', values: lengths.slice(0, 30) },
      { name: 'hull', levels: ['steel', 'oak'], codes: lengths.slice(0, 30).map((_, row) => row % 2) },
    ]);
    const addedSpillPath = join(folder, 'added');
    const spill = new SpillFile(addedSpillPath, 'wx+');
    const added = finishTable(
      {
        rowCount: 20,
        columns: [
          {
            name: 'hull',
            kind: 'category',
            levels: ['ash', 'oak'],
            codes: Int32Array.from({ length: 20 }, (_, row) => row % 2),
          },
          { name: 'length', kind: 'numeric', unit: 'm', values: Float64Array.from(lengths.slice(30)) },
        ],
      },
      spill,
    );
    spill.close();
    const databasePath = databasePathOf(service.services.config);
    task = { databasePath, baseRevisionId, added, addedSpillPath, spillPath: join(folder, 'all') };
  });

  afterAll(async () => {
    await service.close();
    rmSync(folder, { recursive: true });
  });

  it('answers the whole table, with its cells in the new spill file, and says how far it is', async () => {
    const said: unknown[] = [];
    const whole = await appendInThread(task, { ...options, onProgress: (progress) => said.push(progress) });
    expect(whole.rowCount).toBe(50);
    const spill = new SpillFile(task.spillPath, 'r');
    const [length, hull] = whole.columns.map((column) => readSpilledColumn(column, 50, spill));
    spill.close();
    expect(length).toEqual({ name: 'length', kind: 'numeric', unit: 'm', values: Float64Array.from(lengths) });
    expect(hull).toMatchObject({ levels: ['steel', 'oak', 'ash'] });
    expect(whole.columns[1].levels.map((level) => level.count)).toEqual([15, 25, 10]);
    expect(said).toEqual([
      { stage: 'measuring', done: 1, total: 2 },
      { stage: 'measuring', done: 2, total: 2 },
    ]);
  });

  it('ends when it is cancelled', async () => {
    const signal = AbortSignal.abort(new Error('cancelled'));
    await expect(appendInThread({ ...task, spillPath: join(folder, 'never') }, { ...options, signal })).rejects.toThrow(
      'cancelled',
    );
  });
});
