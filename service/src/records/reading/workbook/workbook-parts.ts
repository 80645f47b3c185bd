import { posix } from 'node:path';
import { crc32 } from 'node:zlib';
import { TableProblem } from '../table-problem';
import { damagedWorkbook, requireOpen, workbookPart } from './workbook-file';
import {
  readPacked,
  readZipDirectory,
  unpacked,
  ZipDamaged,
  zipMethod,
  ZipTooLarge,
  type ZipEntry,
} from './zip-directory';
import type { PackedPart } from './zip-excerpt';

export interface Sheet {
  readonly name: string;
  readonly hidden: boolean;
  /** The part that holds its cells. */
  readonly part: string;
}

/** What is unpacked of a workbook at the most. Its cells are held in memory, which takes several times as much. */
const maximumUnpackedBytes = 250_000_000;
/** The workbook's list of sheets and their relations. */
const maximumListBytes = 5_000_000;
const relationsPart = 'xl/_rels/workbook.xml.rels';

const stylesPart = 'xl/styles.xml';
const noStylesXml = Buffer.from('<styleSheet/>');

/** The reader of workbooks fails on one that has neither styles nor shared words, which need not be there. */
const noStyles: PackedPart = {
  entry: {
    ...{ name: stylesPart, method: zipMethod.stored, encrypted: false, headerOffset: 0 },
    ...{ crc: crc32(noStylesXml), packedBytes: noStylesXml.length, unpackedBytes: noStylesXml.length },
  },
  packed: noStylesXml,
  unpackedBytes: noStylesXml.length,
};

const tooLarge = (): TableProblem =>
  new TableProblem(
    'file-too-large',
    `The sheet unpacks to more than ${maximumUnpackedBytes / 1_000_000} MB. Save it as “CSV UTF-8”, which has no such limit, or send it in parts.`,
  );

const entities: Readonly<Record<string, string>> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };

const decoded = (text: string): string =>
  text.replace(/&(?:#x([0-9a-f]{1,6})|#(\d{1,7})|(\w+));/gi, (whole, hex, decimal, name: string) => {
    const code = hex ? parseInt(hex as string, 16) : Number(decimal);
    if (name) return entities[name] ?? whole;
    return code <= 0x10ffff ? String.fromCodePoint(code) : whole;
  });

/**
 * The attributes of every element of a name, whatever their prefixes (ECMA-376 part 1, sections 18.2.19 and 18.2.20).
 * Both patterns look at a character a bounded number of times, whatever stands in the file: an element ends before the
 * next one begins, and an attribute begins only after a space.
 */
function elements(xml: string, name: string): Readonly<Record<string, string>>[] {
  const tags = xml.matchAll(new RegExp(`<(?:\\w+:)?${name}(\\s(?:[^<>"']|"[^<"]*"|'[^<']*')*)>`, 'g'));
  return [...tags].map(([, attributes]) =>
    Object.fromEntries(
      [...attributes.matchAll(/\s(?:\w+:)?(\w+)\s*=\s*(?:"([^"]*)"|'([^']*)')/g)].map(([, key, double, single]) => [
        key,
        decoded(double ?? single ?? ''),
      ]),
    ),
  );
}

/** A workbook's parts, unpacked within limits. */
export class WorkbookParts {
  private constructor(
    private readonly path: string,
    private readonly entries: ReadonlyMap<string, ZipEntry>,
    readonly sheets: readonly Sheet[],
    private readonly shared: readonly string[],
  ) {}

  static async open(path: string): Promise<WorkbookParts> {
    const entries = new Map((await readZipDirectory(path)).map((entry) => [entry.name, entry]));
    const relations = elements(await textOf(path, entries, relationsPart), 'Relationship').map((relation) => ({
      ...relation,
      part: posix
        .join(
          '/xl',
          relation['Target']?.startsWith('/') ? posix.join('..', relation['Target']) : (relation['Target'] ?? ''),
        )
        .slice(1),
    }));
    const partOf = new Map(relations.map((relation) => [(relation as Record<string, string>)['Id'], relation.part]));
    const sheets = elements(await textOf(path, entries, workbookPart), 'sheet').flatMap(({ name, id, state }) => {
      const part = partOf.get(id);
      return name && part && entries.has(part)
        ? [{ name, part, hidden: state !== undefined && state !== 'visible' }]
        : [];
    });
    const shared = relations.flatMap((relation) =>
      /\/(styles|sharedStrings)$/.test((relation as Record<string, string>)['Type'] ?? '') ? [relation.part] : [],
    );
    return new WorkbookParts(path, entries, sheets, [...shared, stylesPart, 'xl/sharedStrings.xml']);
  }

  /** The parts that a sheet's cells need, packed, their unpacked size checked. */
  async partsOf(sheet: Sheet): Promise<readonly PackedPart[]> {
    const names = [...new Set([workbookPart, relationsPart, ...this.shared, sheet.part])];
    const parts: PackedPart[] = [];
    let left = maximumUnpackedBytes;
    for (const name of names) {
      const entry = this.entries.get(name);
      if (!entry) continue;
      const packed = await packedOf(this.path, entry);
      let unpackedBytes = 0;
      for await (const piece of checked(packed, entry, left)) unpackedBytes += piece.length;
      left -= unpackedBytes;
      parts.push({ entry, packed, unpackedBytes });
    }
    return this.entries.has(stylesPart) || parts.some(({ entry }) => /styles\.xml$/.test(entry.name))
      ? parts
      : [...parts, noStyles];
  }
}

async function packedOf(path: string, entry: ZipEntry): Promise<Buffer> {
  requireOpen(entry);
  if (entry.packedBytes > maximumUnpackedBytes) throw tooLarge();
  try {
    return await readPacked(path, entry);
  } catch (error) {
    throw error instanceof ZipDamaged ? damagedWorkbook('is damaged or breaks off') : error;
  }
}

async function* checked(packed: Buffer, entry: ZipEntry, mostBytes: number): AsyncGenerator<Buffer> {
  try {
    yield* unpacked(packed, entry, mostBytes);
  } catch (error) {
    if (error instanceof ZipTooLarge) throw tooLarge();
    throw error instanceof ZipDamaged ? damagedWorkbook('is damaged') : error;
  }
}

async function textOf(path: string, entries: ReadonlyMap<string, ZipEntry>, name: string): Promise<string> {
  const entry = entries.get(name);
  if (!entry) throw damagedWorkbook('lacks its list of sheets');
  const pieces: Buffer[] = [];
  for await (const piece of checked(await packedOf(path, entry), entry, maximumListBytes)) pieces.push(piece);
  return Buffer.concat(pieces).toString('utf8');
}
