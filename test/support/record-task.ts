import { setTimeout as wait } from 'node:timers/promises';
import type { components } from '../../openapi/types/desk';
import type { TestAgent } from './test-service';

type RecordTask = components['schemas']['RecordTask'];

/** The task as it ended. */
export async function endOfTask(agent: TestAgent, id: string): Promise<RecordTask> {
  for (;;) {
    const { body } = await agent.get(`/api/record-tasks/${id}`).expect(200);
    const task = body as RecordTask;
    if (task.state !== 'queued' && task.state !== 'running') return task;
    await wait(20);
  }
}
