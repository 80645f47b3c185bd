/** What the exporting thread is told at its start. */
export interface ExportTask {
  readonly databasePath: string;
  readonly revisionId: string;
}

/** What it answers each time that it is asked for more; null at the end. */
export type ExportedPart = Uint8Array | null;
