import { compose } from '../compose';
import { migrationsFolder } from '../database/migrations-folder';
import { migrate } from '../database/migrator';
import { hashPassword } from '../people/password';
import { askedCases } from './asked-cases';
import { demonstrationPassword, enterCast, type Cast } from './cast';
import { craneSteps } from './crane-story';
import type { DemonstrationOptions } from './demonstration';
import { EstimateWriter } from './estimate-writer';
import { MovableClock } from './movable-clock';
import { demonstrationNote, type DemonstrationNote } from './note';
import { paintSteps } from './paint-story';
import { partnerSteps } from './partner-story';
import { refitSteps } from './refit-story';
import { Stage, type Step } from './stage';

const dayMs = 24 * 60 * 60 * 1000;
const firstDay = 420;
const tellEveryMs = 2500;

/** Midnight of this week's Monday: counted from there, the days of the stories are working days. */
function mondayOf(now: number): number {
  const day = Math.floor(now / dayMs);
  // 1 January 1970 was a Thursday.
  return (day - ((day + 3) % 7)) * dayMs;
}

function timeOf(step: Pick<Step, 'daysAgo' | 'at'>, now: number): number {
  const [hours, minutes] = step.at.split(':').map(Number);
  return mondayOf(now) - step.daysAgo * dayMs + (hours * 60 + minutes) * 60_000;
}

async function playSteps(stage: Stage, steps: readonly Step[], options: DemonstrationOptions): Promise<void> {
  const now = options.now.getTime();
  const writer = new EstimateWriter(stage, askedCases(now, firstDay));
  let toldAt = Date.now();
  for (const [position, step] of steps.entries()) {
    const time = timeOf(step, now);
    await writer.writeUntil(time);
    stage.clock.moveTo(time);
    await step.act();
    if (Date.now() - toldAt < tellEveryMs) continue;
    toldAt = Date.now();
    options.tell(
      `Filling the demonstration: step ${position + 1} of ${steps.length}, ${writer.written} estimates so far`,
    );
  }
  await writer.writeUntil(now);
}

function stepsOf(stage: Stage, options: DemonstrationOptions): Step[] {
  const steps = [
    ...refitSteps(stage),
    ...paintSteps(stage),
    ...craneSteps(stage),
    ...partnerSteps(stage, options.config.partnerPageUrl),
  ];
  const now = options.now.getTime();
  return steps.sort((first, second) => timeOf(first, now) - timeOf(second, now));
}

async function openStage(options: DemonstrationOptions, draftFolder: string): Promise<Stage> {
  const clock = new MovableClock(timeOf({ daysAgo: firstDay, at: '08:30' }, options.now.getTime()));
  const { log, threadArguments } = options;
  const services = compose({
    config: { ...options.config, dataFolder: draftFolder },
    log,
    clock,
    sessionCleanupMs: 0,
    fitThreadArguments: threadArguments,
  });
  await migrate(services.knex, migrationsFolder);
  // A draft that is lost in a power cut is drawn up again; the last step makes it lasting.
  await services.knex.raw('PRAGMA synchronous = OFF');
  const passwordHash = await hashPassword(demonstrationPassword);
  const cast: Cast = await enterCast({ ...services, passwordHash });
  await services.settingsService.change(
    { deskName: 'Marl Bay Yard Federation', contactEmail: 'desk@marlbay.example' },
    cast.administrator,
  );
  return new Stage(services, clock, cast, passwordHash);
}

/** Plays the demonstration's year and more with the real services, into a database in the draft folder. */
export async function play(options: DemonstrationOptions, draftFolder: string): Promise<DemonstrationNote> {
  const stage = await openStage(options, draftFolder);
  try {
    await playSteps(stage, stepsOf(stage, options), options);
    await stage.services.knex.raw('PRAGMA synchronous = FULL');
    await stage.services.knex.raw('PRAGMA wal_checkpoint(TRUNCATE)');
    return await demonstrationNote(stage);
  } finally {
    await stage.services.close();
  }
}
