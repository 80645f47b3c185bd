import type { EstimateRecord } from '../api/contract';
import { Room } from '../ui/testing/room';
import { estimatesRoutes } from './estimates.routes';

const PATH = '/api/estimates/estimate0001';
const EDITION = '/api/editions/edition00004';

const estimate: EstimateRecord = {
  id: 'estimate0001',
  estimator: 'refit-labour',
  estimatorName: 'Refit labour',
  edition: 4,
  editionId: 'edition00004',
  value: 512.3781,
  unit: 'h',
  interval: { level: 0.9, low: 440.2, high: 590.9 },
  typical: 354.9,
  scale: 'original',
  issuedAt: '2026-11-30T14:22:07Z',
  flags: [{ code: 'missing-filled', input: 'ballast', message: 'Ballast was not given; the typical 3.1 t was used.' }],
  cautions: ['An estimate is not a quotation.'],
  inputs: { displacement: 9.8, ballast: null, winter_booking: true },
  contributions: [
    { input: 'displacement', label: 'Displacement', arm: 1.4, mass: 120, contribution: 168 },
    { input: 'winter_booking', label: 'Winter booking', arm: -1.1, mass: 9.6, contribution: -10.5 },
    { input: 'ballast', label: 'Ballast', arm: 0, mass: 11, contribution: 0 },
  ],
  checksum: 'c'.repeat(64),
  revision: {
    id: 'revision0007',
    number: 7,
    sha256: 'a'.repeat(64),
    rowCount: 2391,
    recordSetId: 'recordset001',
    recordSetName: 'Refit jobs',
  },
  approvedBy: { id: 'person0tomas', name: 'Tomas Averill' },
  partner: { id: 'partner0pell', name: 'Pell & Tarn Brokers' },
  key: { id: 'key0000boats', label: 'Boat pages', kind: 'embed' },
};

const inputSchema = {
  type: 'object',
  properties: {
    ballast: { title: 'Ballast', type: 'number', 'x-unit': 't', 'x-order': 2 },
    displacement: { title: 'Displacement', type: 'number', 'x-unit': 't', 'x-order': 1 },
  },
};

function enter(address = '/estimates/estimate0001'): Promise<Room> {
  return Room.open({ path: 'estimates', routes: estimatesRoutes, address });
}

async function open(): Promise<Room> {
  const room = await enter();
  await room.answer(PATH, estimate);
  return room;
}

function facts(room: Room, heading: string): Record<string, string> {
  const section = [...room.page.querySelectorAll('section')].find(
    (each) => each.querySelector('h2')?.textContent === heading,
  );
  const names = [...(section?.querySelectorAll('dt') ?? [])];
  const words = (element: Element | null) => (element?.textContent ?? '').replace(/\s+/g, ' ').trim();
  return Object.fromEntries(names.map((name) => [words(name), words(name.nextElementSibling)]));
}

describe('EstimatePage', () => {
  it('says what it is reading while it waits', async () => {
    expect((await enter()).text).toContain('Reading the estimate');
  });

  it('says what went wrong and reads again when asked', async () => {
    const room = await enter();
    await room.refuse(PATH, { status: 503, code: 'unavailable', detail: 'The database is busy.' });
    expect(room.text).toContain('The database is busy.');
    await room.press('Try again');
    await room.answer(PATH, estimate);
    expect(room.has('h1', 'Estimate estimate0001')).toBe(true);
  });

  it('says that there is no such estimate, and lets another reference be tried', async () => {
    const room = await enter();
    await room.refuse(PATH, { status: 404, code: 'not-found' });
    expect(room.has('h1', 'No such estimate')).toBe(true);
    await room.type('Reference of an estimate', ' ESTIMATE 0002 ');
    await room.press('Find');
    expect(room.address).toBe('/estimates/estimate0002');
    await room.answer('/api/estimates/estimate0002', { ...estimate, id: 'estimate0002' });
    expect(room.has('h1', 'Estimate estimate0002')).toBe(true);
  });

  it('states value and interval with the digits that the interval allows, and the flags', async () => {
    const room = await open();
    expect(room.text).toContain('512 hours');
    expect(room.text).toContain('Nine of ten such cases come to between 440 and 590 h.');
    expect(room.page.querySelector('[aria-label="Flags"]')?.textContent).toContain('the typical 3.1 t was used');
  });

  it('names the edition, the records and both checksums, who approved it and who asked', async () => {
    const room = await open();
    expect(facts(room, 'Where it came from')).toMatchObject({
      Edition: 'Edition 4',
      'Approved by': 'Tomas Averill',
      'Formula, SHA-256': 'c'.repeat(64),
      Records: 'Refit jobs, revision 7, 2,391 rows',
      'Records, SHA-256': 'a'.repeat(64),
      'Asked by': 'Pell & Tarn Brokers, with the embed key “Boat pages”',
      Reference: 'estimate0001',
    });
    expect(room.link('Edition 4').getAttribute('href')).toBe('/estimators/refit-labour/editions/edition00004');
    expect(room.link('Refit jobs').getAttribute('href')).toBe('/records/recordset001');
    expect(room.link('Pell & Tarn Brokers').getAttribute('href')).toBe('/partners/partner0pell');
  });

  it('tables what moved it, each input once, with arm, mass and contribution', async () => {
    const room = await open();
    expect(room.cells(0).slice(0, 3)).toEqual(['Displacement', 'Winter booking', 'Ballast']);
    expect(room.text).toContain('+168');
  });

  it('shows the case under the inputs’ own names until the edition gives units and order', async () => {
    const room = await open();
    expect(facts(room, 'The case')).toEqual({
      Displacement: '9.8',
      Ballast: 'not given Ballast was not given; the typical 3.1 t was used.',
      'Winter booking': 'yes',
    });
    await room.answer(EDITION, { id: 'edition00004', inputSchema });
    expect(facts(room, 'The case')['Displacement']).toBe('9.8 t');
  });

  it('stays readable when the edition cannot be read', async () => {
    const room = await open();
    await room.refuse(EDITION, { status: 503, code: 'unavailable' });
    expect(facts(room, 'The case')['Displacement']).toBe('9.8');
  });
});
