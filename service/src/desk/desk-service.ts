import type { components } from '../../../openapi/types/desk';
import type { Clock } from '../clock';
import { toEditionSummary } from '../editions/edition-summary';
import type { EditionsStore } from '../editions/editions-store';
import type { JournalService } from '../journal/journal-service';
import type { SignedInPerson } from '../people/person';
import type { Settings } from '../settings/settings';
import type { DeskStore } from './desk-store';

type DeskOverview = components['schemas']['DeskOverview'];

const recentCount = 10;
const dayMs = 24 * 60 * 60 * 1000;

export interface DeskServiceParts {
  readonly desk: DeskStore;
  readonly editions: EditionsStore;
  readonly journal: JournalService;
  readonly settings: Settings;
  readonly clock: Clock;
}

export class DeskService {
  constructor(private readonly parts: DeskServiceParts) {}

  async read(person: SignedInPerson): Promise<DeskOverview> {
    const { desk, editions, settings } = this.parts;
    const { deskName } = await settings.read();
    return {
      deskName,
      underReview: (await editions.listInState('under-review')).map(toEditionSummary),
      inForce: (await editions.listInState('in-force')).map(toEditionSummary),
      fitsUnderWay: await desk.fitsUnderWay(),
      estimatesToday: await desk.estimatesSince(this.startOfDay(0)),
      estimatesLast30Days: await desk.estimatesSince(this.startOfDay(29)),
      recent: await this.recent(person),
    };
  }

  /** Who was invited and which key was revoked is for administrators; the others see the desk's own work. */
  private async recent(person: SignedInPerson): Promise<DeskOverview['recent']> {
    const { journal } = this.parts;
    return person.roles.includes('administrator') ? journal.newest(recentCount) : journal.newestOfDeskWork(recentCount);
  }

  /** Midnight UTC of today or of a day before: 30 days are today and the 29 before it. */
  private startOfDay(daysBefore: number): string {
    const now = this.parts.clock.now().getTime();
    return new Date(now - (now % dayMs) - daysBefore * dayMs).toISOString();
  }
}
