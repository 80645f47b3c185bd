import pLimit from 'p-limit';
import type { components } from '../../../../openapi/types/desk';
import { proposeInThread } from '../proposal-thread';
import type { ReadingChoices } from '../reading/reading-choices';
import type { RecordsStore } from '../records-store';
import { revisionWithRows } from '../required-rows';

type Proposal = components['schemas']['ReadingProposal'];

export interface ReadingProposalsParts {
  readonly records: RecordsStore;
  /** Node's own arguments for the thread; none when compiled. */
  readonly threadArguments: readonly string[];
}

export interface ProposalOptions {
  /** The revision that the file is to be appended to, whose kinds and units then hold. */
  readonly appendTo?: string;
  readonly signal?: AbortSignal;
}

/** Files looked at at the same time; each takes a thread. */
const lookedAtOnce = 2;

/** How a file would be read. */
export class ReadingProposals {
  private readonly queue = pLimit(lookedAtOnce);

  constructor(private readonly parts: ReadingProposalsParts) {}

  of(path: string, choices: ReadingChoices, { appendTo, signal }: ProposalOptions): Promise<Proposal> {
    return this.queue(async () => {
      signal?.throwIfAborted();
      const options = { nodeArguments: this.parts.threadArguments, signal };
      if (appendTo === undefined) return { ...(await proposeInThread({ path, choices }, options)), appending: null };
      const { revision, base } = await this.baseOf(appendTo);
      const { appending, ...proposal } = await proposeInThread({ path, choices, base }, options);
      return { ...proposal, appending: appending && { ...appending, revision } };
    });
  }

  private async baseOf(id: string) {
    const { records } = this.parts;
    const { number, recordSetId, recordSetName } = await revisionWithRows(records, id);
    return { revision: { id, number, recordSetId, recordSetName }, base: await records.columnsOf(id) };
  }
}
