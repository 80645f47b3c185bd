import { timeText, type Clock } from '../../clock';
import type { KeptFiles } from '../kept-files';
import type { IncomingFilesStore } from './incoming-files-store';

export interface IncomingSweepParts {
  readonly incoming: IncomingFilesStore;
  readonly files: KeptFiles;
  readonly clock: Clock;
}

/** Clears files away that were sent and never brought in. */
export class IncomingSweep {
  constructor(private readonly parts: IncomingSweepParts) {}

  /** Those whose time has passed. While one is brought in its time is put off, so none is taken from a running task. */
  async removeOld(): Promise<void> {
    const { incoming, files, clock } = this.parts;
    const names = await incoming.removeKeptUntil(timeText(clock));
    await files.remove(...names.map((name) => files.pathOf(name)));
  }

  /** What a process that was killed left behind. File times are the machine's own, so its clock counts. */
  async removeLeftBehind(now = new Date()): Promise<void> {
    const named = await this.parts.incoming.namedFiles();
    await this.parts.files.sweep(now, (name) => named.has(name));
  }
}
