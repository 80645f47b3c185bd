/**
 * A file such as a yard's office sends, made for the tests: every fault in it is put there on purpose and listed. What
 * it measures is invented; what is tested is that each fault is found, not what the numbers say.
 */
export interface MessyFile {
  readonly fileName: string;
  readonly text: string;
  readonly faults: MessyFaults;
}

/** Rows are counted from 1 below the header, as screens count them. */
export interface MessyFaults {
  /** Lines above the one that names the columns. */
  readonly titleLines: number;
  readonly rowCount: number;
  /** `length overall` was entered in feet, the unit standing behind the number. */
  readonly feetInCells: readonly number[];
  /** `waterline length (m)` holds feet, unmarked. */
  readonly feet: readonly number[];
  /** `displacement (t)` holds kilograms, unmarked. */
  readonly kilograms: readonly number[];
  /** `crew` holds 999 for "not counted". */
  readonly marked999: readonly number[];
  readonly repeated: readonly number[];
  readonly nearlyRepeated: readonly number[];
  /** Spellings of one hull material. */
  readonly spellings: readonly string[];
  readonly constantColumn: string;
  /** The second says what the first does. */
  readonly copies: readonly [string, string];
  /** The first is the sum of the others. */
  readonly combination: readonly string[];
  /** Known only after the job, and nearly the target. */
  readonly leak: { readonly column: string; readonly target: string };
  readonly typingError: { readonly column: string; readonly row: number };
  /** Words among the numbers of this column. */
  readonly nearlyNumeric: string;
  /** No job was finished between these days. */
  readonly timeGap: { readonly column: string; readonly from: string; readonly to: string };
  /** Names people: must never be stored. */
  readonly personal: { readonly column: string; readonly example: string };
}

const ownerNames = ['Wren Askerhythe', 'Odo Plimsworth', 'Ysolde Tarnkeep', 'Bram Quillfoote'];
const spellings = ['steel', 'Steel', 'STEEL ', 'oak', 'glass fibre'];
const jobs = 300;

/** Park and Miller 1988, "Random number generators: good ones are hard to find": the same file each time. */
function draws(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 48271) % 2147483647) / 2147483647;
}

const german = (value: number, digits: number): string => {
  const [whole, fraction] = value.toFixed(digits).split('.');
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, '.');
  return fraction === undefined ? grouped : `${grouped},${fraction}`;
};

const dayText = (days: number): string => {
  const [year, month, day] = new Date(days * 86_400_000).toISOString().slice(0, 10).split('-');
  return `${day}.${month}.${year}`;
};

interface Job {
  readonly reference: string;
  readonly finished: number;
  readonly owner: string;
  readonly length: number;
  readonly waterline: number;
  readonly beam: number;
  readonly hullWeight: number;
  readonly ballast: number;
  readonly hull: string;
  readonly crew: number;
  readonly labour: number;
}

const firstDay = Date.UTC(2024, 0, 8) / 86_400_000;
/** From job 170 on the days are four months later. */
const gapAfter = 169;
const gapDays = 120;

function drawJob(next: () => number, at: number): Job {
  const around = (spread: number): number => 1 + spread * (next() + next() - 1);
  const length = 8 + 10 * next();
  const waterline = 0.86 * length * around(0.05);
  const beam = 0.9 * length ** 0.6 * around(0.08);
  const hullWeight = 0.0045 * length ** 2.6 * around(0.12);
  const ballast = 0.55 * hullWeight * around(0.2);
  return {
    reference: `J${2001 + at}`,
    finished: firstDay + Math.floor(at * 1.9) + (at > gapAfter ? gapDays : 0),
    owner: ownerNames[at % ownerNames.length],
    ...{ length, waterline, beam, hullWeight, ballast },
    hull: spellings[[0, 0, 0, 3, 4, 4, 1, 3, 0, 2][at % 10]],
    crew: 2 + Math.floor(5 * next()),
    labour: 14 * length ** 0.9 * (hullWeight + ballast) ** 0.25 * around(0.35),
  };
}

const columns = [
  'job',
  'finished',
  'owner',
  'length overall',
  'waterline length (m)',
  'beam (m)',
  'beam (cm)',
  'hull weight (t)',
  'ballast (t)',
  'displacement (t)',
  'hull',
  'crew',
  'berth',
  'yard',
  'invoiced (h)',
  'labour (h)',
] as const;

const listed = {
  feetInCells: [12, 61, 140],
  feet: [23, 57, 118, 201, 240],
  kilograms: [34, 99, 176, 251],
  marked999: [8, 45, 77, 133, 190, 222],
  typingErrorRow: 66,
  wordRows: [15, 88, 160],
  missingBallast: [5, 50, 111, 207],
} as const;

function cellsOf(job: Job, row: number, next: () => number): string[] {
  const has = (rows: readonly number[]): boolean => rows.includes(row);
  const displacement = job.hullWeight + job.ballast;
  const labour = row === listed.typingErrorRow ? job.labour * 60 : job.labour;
  return [
    job.reference,
    dayText(job.finished),
    job.owner,
    has(listed.feetInCells) ? `${german(job.length / 0.3048, 2)} ft` : `${german(job.length, 2)} m`,
    german(has(listed.feet) ? job.waterline / 0.3048 : job.waterline, 3),
    german(job.beam, 3),
    german(100 * job.beam, 1),
    german(job.hullWeight, 4),
    has(listed.missingBallast) ? 'n/a' : german(job.ballast, 4),
    has(listed.kilograms) ? german(1000 * displacement, 1) : german(displacement, 4),
    job.hull,
    has(listed.marked999) ? '999' : String(job.crew),
    has(listed.wordRows) ? 'see plan' : String(1 + Math.floor(40 * next())),
    'Marl Point',
    german(labour * (1 + 0.002 * (next() - 0.5)), 2),
    german(labour, 2),
  ];
}

/** The same job entered again: repeated throughout, or with one figure retyped. */
function entered(rows: readonly (readonly string[])[]): {
  readonly rows: readonly (readonly string[])[];
  readonly repeated: readonly number[];
  readonly nearlyRepeated: readonly number[];
} {
  const again = [rows[39], rows[119], rows[209]];
  const retyped = [rows[29], rows[149]].map((row) =>
    row.map((cell, column) => (columns[column] === 'beam (m)' ? cell.replace(/\d$/, '0') : cell)),
  );
  const from = rows.length + 1;
  return {
    rows: [...rows, ...again, ...retyped],
    repeated: [from, from + 1, from + 2],
    nearlyRepeated: [from + 3, from + 4],
  };
}

export function messyFile(): MessyFile {
  const next = draws(20_261_201);
  const table = entered(Array.from({ length: jobs }, (_, at) => cellsOf(drawJob(next, at), at + 1, next)));
  const gapFrom = firstDay + Math.floor(gapAfter * 1.9);
  const lines = ['Marl Point Yard; jobs finished', 'drawn from the yard book', columns.join(';')];
  const iso = (days: number): string => new Date(days * 86_400_000).toISOString().slice(0, 10);
  return {
    fileName: 'marl-point-jobs.csv',
    text: [...lines, ...table.rows.map((row) => row.join(';')), ''].join('\r\n'),
    faults: {
      titleLines: 2,
      rowCount: table.rows.length,
      feetInCells: listed.feetInCells,
      feet: listed.feet,
      kilograms: listed.kilograms,
      marked999: listed.marked999,
      repeated: table.repeated,
      nearlyRepeated: table.nearlyRepeated,
      spellings: spellings.slice(0, 3),
      constantColumn: 'yard',
      copies: ['beam (m)', 'beam (cm)'],
      combination: ['displacement (t)', 'hull weight (t)', 'ballast (t)'],
      leak: { column: 'invoiced (h)', target: 'labour (h)' },
      typingError: { column: 'labour (h)', row: listed.typingErrorRow },
      nearlyNumeric: 'berth',
      timeGap: {
        column: 'finished',
        from: iso(gapFrom),
        to: iso(firstDay + Math.floor((gapAfter + 1) * 1.9) + gapDays),
      },
      personal: { column: 'owner', example: ownerNames[0] },
    },
  };
}
