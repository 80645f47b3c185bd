import type { MendStep } from '../../api/contract';
import { readStep } from './read-step';
import { draftOf, emptyDraft, withColumn } from './step-draft';
import type { TrialColumn } from './trials';

const COLUMNS: readonly TrialColumn[] = [
  { name: 'Beam', kind: 'numeric', unit: 'm', missingCount: 0 },
  { name: 'Hull', kind: 'category', unit: null, missingCount: 2 },
];

const STEPS: readonly MendStep[] = [
  { kind: 'rename', column: 'Beam', to: 'Width' },
  { kind: 'set-aside', column: 'Beam' },
  { kind: 'set-unit', column: 'Beam', unit: null },
  { kind: 'set-unit', column: 'Beam', unit: 'cm' },
  { kind: 'set-kind', column: 'Hull', to: 'text' },
  { kind: 'set-kind', column: 'Hull', to: 'date', dateOrder: 'day-first' },
  { kind: 'convert-unit', column: 'Beam', factor: 0.3048 },
  { kind: 'convert-unit', column: 'Beam', factor: 1 / 0.3048, unit: 'ft', where: '[Beam] > 9' },
  { kind: 'convert-unit', column: 'Beam', factor: 0.1, unit: null, rows: [3, 14], where: '[Beam] > 9' },
  { kind: 'map-levels', column: 'Hull', levels: { grp: 'GRP', glass: 'GRP' } },
  { kind: 'set-missing', column: 'Beam', where: '[Beam] = 999' },
  { kind: 'drop-rows', rows: [1] },
  { kind: 'drop-repeated-rows' },
  { kind: 'join-rare-levels', column: 'Hull', fewerThan: 5, into: 'other' },
  { kind: 'derive', name: 'Area', formula: '[Beam] ^ 2', unit: 'm²' },
  { kind: 'derive', name: 'Root', formula: 'sqrt([Beam])' },
];

describe('the fields of a step', () => {
  it.each(STEPS.map((step) => [JSON.stringify(step), step] as const))('give back %s to every digit', (_, step) => {
    expect(readStep(draftOf(step, COLUMNS), COLUMNS)).toEqual({ step });
  });

  it('leave the unit out of a conversion that does not change it', () => {
    const draft = { ...withColumn(emptyDraft('convert-unit'), 'Beam', COLUMNS), factor: '0,1' };
    expect(readStep(draft, COLUMNS)).toEqual({ step: { kind: 'convert-unit', column: 'Beam', factor: 0.1 } });
  });

  it('put together what was mapped before and what is ticked now', () => {
    const draft = {
      ...emptyDraft('map-levels'),
      column: 'Hull',
      levels: { stl: 'steel' },
      ticked: ['grp'],
      target: ' GRP ',
    };
    expect(readStep(draft, COLUMNS)).toEqual({
      step: { kind: 'map-levels', column: 'Hull', levels: { stl: 'steel', grp: 'GRP' } },
    });
  });

  it('read row numbers however they are parted, each once and in order', () => {
    const draft = { ...emptyDraft('drop-rows'), byCondition: false, byNumber: true, rows: '14; 3,3\n200' };
    expect(readStep(draft, COLUMNS)).toEqual({ step: { kind: 'drop-rows', rows: [3, 14, 200] } });
  });

  it.each([
    ['column', { kind: 'rename', name: 'Width' }, 'Choose a column'],
    ['name', { kind: 'rename', column: 'Beam' }, 'Enter the new name'],
    [
      'factor',
      { kind: 'convert-unit', column: 'Beam', factor: 'a third' },
      'Enter the factor as a number, such as 0.3048',
    ],
    ['factor', { kind: 'convert-unit', column: 'Beam', factor: '0' }, 'Enter the factor as a number, such as 0.3048'],
    ['levels', { kind: 'map-levels', column: 'Hull' }, 'Tick the levels to map'],
    ['target', { kind: 'map-levels', column: 'Hull', ticked: ['grp'] }, 'Enter what they become'],
    ['choice', { kind: 'drop-rows', byCondition: false }, 'Say which rows, by a condition or by number'],
    ['where', { kind: 'drop-rows' }, 'Enter a condition'],
    [
      'rows',
      { kind: 'drop-rows', byCondition: false, byNumber: true, rows: '3, x' },
      'Enter row numbers parted by commas, such as 3, 14, 25',
    ],
    ['fewerThan', { kind: 'join-rare-levels', column: 'Hull', fewerThan: '1' }, 'Enter a whole number from 2'],
    ['formula', { kind: 'derive', name: 'Area' }, 'Enter a formula'],
  ] as const)('complain about %s of %j', (field, entered, complaint) => {
    const reading = readStep(
      { ...emptyDraft(entered.kind), ...entered, ticked: 'ticked' in entered ? [...entered.ticked] : [] },
      COLUMNS,
    );
    expect('complaints' in reading && reading.complaints[field]).toBe(complaint);
  });
});
