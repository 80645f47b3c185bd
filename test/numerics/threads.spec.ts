import { join } from 'node:path';
import { FoldPool } from '../../service/src/fits/fold-pool';
import { fitRecords } from '../../service/src/regression/fit';
import { inventedRefits } from './invented-yard';

const hook = join(__dirname, '..', 'support', 'typescript-hook.js');

describe('folds in worker threads', () => {
  it.each(['ridge', 'lasso'] as const)('give the same bits as folds on one thread: %s', async (method) => {
    const records = inventedRefits(400, 5);
    const inputs = ['length', 'waterline', 'hull', 'yard'].map((column) => ({ column }));
    const specification = { target: { column: 'labour', transform: 'log' }, inputs, method } as const;
    const answered: string[] = [];
    const pool = new FoldPool({
      threads: 2,
      nodeArguments: ['-r', hook],
      onAnswered: (done, total) => answered.push(`${done} of ${total}`),
    });
    const threaded = await fitRecords(records, specification, { runFolds: pool.run });
    await pool.close();
    expect(JSON.stringify(threaded)).toBe(JSON.stringify(await fitRecords(records, specification)));
    expect(answered).toContain('10 of 10');
  });
});
