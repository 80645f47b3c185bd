import type { RevisionDeletion, RevisionSummary } from '../../api/contract';
import { countOf, formatBytes } from '../../ui/figure';
import { listed } from '../../ui/listed';

/** What is to be deleted. */
export interface Removal {
  readonly revision: RevisionSummary;
  readonly recordSetName: string;
}

/** `revision 3, 2 fits and the record set`. */
export function removedOf({ revisionNumber, fits, goesWithSet }: RevisionDeletion): string {
  const parts = [
    `revision ${revisionNumber}`,
    ...(fits.length > 0 ? [countOf(fits.length, 'fit')] : []),
    ...(goesWithSet ? ['the record set'] : []),
  ];
  return listed(parts);
}

/** What goes, a sentence each; the fits are named apart. */
export function goingOf(deletion: RevisionDeletion, { revision, recordSetName }: Removal): readonly string[] {
  const file = `${revision.fileName} (${formatBytes(deletion.byteCount)})`;
  return [
    revision.erasedAt === null
      ? `Its ${countOf(deletion.rowCount, 'row')} and what is known of its columns.`
      : 'What is still known of its columns; its rows were erased before.',
    ...(deletion.originalGoes ? [`The original file ${file}: no other revision came from it.`] : []),
    ...(deletion.goesWithSet ? [`The record set ${recordSetName}, since this is its only revision.`] : []),
  ];
}

/** What stays although it hangs together with the revision. */
export function stayingOf(deletion: RevisionDeletion, { revision }: Removal): readonly string[] {
  const { basedOnIt } = deletion;
  const kept = revision.originalKept && !deletion.originalGoes && revision.erasedAt === null;
  const based =
    basedOnIt.length === 1 ? `Revision ${basedOnIt[0]}, which was` : `Revisions ${listed(basedOnIt)}, which were`;
  return [
    ...(kept ? [`The original file ${revision.fileName}: another revision came from it too.`] : []),
    ...(basedOnIt.length > 0 ? [`${based} made from it.`] : []),
  ];
}
