/**
 * What is wrong with a day as the last on which rows are kept: it has passed, by the service's calendar, which is that
 * of UTC. The day that holds already may stand as it is: its rows are gone.
 */
export function retentionComplaint(day: string, held: string | null = null): string | undefined {
  const past = day !== '' && day !== held && day < new Date().toISOString().slice(0, 10);
  return past ? 'Choose today or a later day as the last on which the rows are kept' : undefined;
}
