/** The columns of a broken UNIQUE constraint (`table.column`), or none when the error is another one. */
export function uniqueColumnsOf(error: unknown): readonly string[] {
  // By its shape: the driver is loaded once a process, so under jest its errors may stem from another file's Error.
  const { message } = (error ?? {}) as { readonly message?: unknown };
  const match = /UNIQUE constraint failed: ([\w., ]+)/.exec(typeof message === 'string' ? message : '');
  return match ? match[1].split(', ') : [];
}

/** Runs a write; a broken UNIQUE constraint on `column` becomes the error made by `translate`. */
export async function translateUnique<Result>(
  write: () => Promise<Result>,
  column: string,
  translate: () => Error,
): Promise<Result> {
  try {
    return await write();
  } catch (error) {
    if (uniqueColumnsOf(error).includes(column)) throw translate();
    throw error;
  }
}
