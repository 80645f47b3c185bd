import { notFound } from '../errors';
import { CompiledEdition } from './compiled-edition';
import type { EditionsStore } from './editions-store';

const mostKept = 200;

/** Editions ready for answering, the least recently used dropped first. An edition never changes, so none goes stale. */
export class CompiledEditions {
  private readonly kept = new Map<string, CompiledEdition>();

  constructor(private readonly editions: EditionsStore) {}

  async get(id: string): Promise<CompiledEdition> {
    const known = this.kept.get(id);
    if (known) {
      this.kept.delete(id);
      this.kept.set(id, known);
      return known;
    }
    const content = await this.editions.content(id);
    if (!content) throw notFound('edition');
    return this.keep(id, new CompiledEdition(content));
  }

  private keep(id: string, edition: CompiledEdition): CompiledEdition {
    this.kept.set(id, edition);
    const [oldest] = this.kept.keys();
    if (this.kept.size > mostKept && oldest !== undefined) this.kept.delete(oldest);
    return edition;
  }
}
