import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { migrationsFolder } from '../../service/src/database/migrations-folder';
import { migrate } from '../../service/src/database/migrator';
import { FitQueueStore } from '../../service/src/fits/fit-queue-store';
import { boatCount, boats, nothingLeft, openBoatDesk, type BoatDesk } from '../support/boat-desk';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

describe('deleting a revision', () => {
  let service: TestService;
  let analyst: TestAgent;
  let desk: BoatDesk;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
    desk = await openBoatDesk(service, analyst);
  });
  afterAll(() => service.close());

  it('says what goes, then takes fits, drafts, columns, cells and row, and leaves what was made from it', async () => {
    const set = await desk.bringIn();
    const first = set.revision.id;
    const second = await desk.mend(first);
    const fitId = await desk.fit(first);
    const steps = [{ kind: 'drop-repeated-rows' }];
    await analyst.put(`/api/record-revisions/${first}/mending-draft`).send({ steps }).expect(200);
    const outlook = await analyst.get(`/api/record-revisions/${first}/deletion`);
    expect(outlook.body).toEqual({
      ...{ revisionNumber: 1, rowCount: boatCount, byteCount: boats.length, editions: [] },
      fits: [{ id: fitId, estimatorSlug: 'refit-labour', estimatorName: 'Refit labour' }],
      ...{ goesWithSet: false, originalGoes: false, basedOnIt: [2] },
    });
    await analyst.delete(`/api/record-revisions/${first}`).expect(204);
    expect(await desk.left(first)).toEqual(nothingLeft);
    expect(existsSync(desk.pathOf(first))).toBe(true);
    await analyst.get(`/api/record-revisions/${first}`).expect(404);
    await analyst.get(`/api/fits/${fitId}`).expect(404);
    const { body } = await analyst.get(`/api/record-sets/${set.id}`).expect(200);
    expect(body.revisions).toMatchObject([{ id: second, number: 2, origin: 'mended', basedOn: null }]);
    const rows = await analyst.get(`/api/record-revisions/${second}/rows?limit=1`).expect(200);
    expect(rows.body.rows).toEqual([[7, 'steel', 90]]);
    await analyst.get(`/api/record-revisions/${second}/original`).expect(200);
    expect((await desk.journalOf(set.id)).at(-1)).toMatchObject({
      action: 'record-revision-deleted',
      summary: `Revision 1 of ${set.name} was deleted with ${boatCount} rows, 1 fit`,
    });
  });

  it('never gives its number to another revision', async () => {
    const set = await desk.bringIn();
    const second = await desk.mend(set.revision.id);
    await analyst.delete(`/api/record-revisions/${second}`).expect(204);
    const { body } = await analyst.get(`/api/record-sets/${set.id}`).expect(200);
    expect([body.lastNumber, body.revision.number]).toEqual([2, 1]);
    const third = await desk.mend(set.revision.id);
    expect((await analyst.get(`/api/record-revisions/${third}`)).body.number).toBe(3);
  });

  it('takes the set and the original file along with the last one', async () => {
    const set = await desk.bringIn();
    const path = desk.pathOf(set.revision.id);
    expect(existsSync(path)).toBe(true);
    const outlook = await analyst.get(`/api/record-revisions/${set.revision.id}/deletion`);
    expect(outlook.body).toMatchObject({ goesWithSet: true, originalGoes: true });
    const before = readdirSync(join(service.services.config.dataFolder, 'uploads')).length;
    await analyst.delete(`/api/record-revisions/${set.revision.id}`).expect(204);
    expect(existsSync(path)).toBe(false);
    expect(readdirSync(join(service.services.config.dataFolder, 'uploads'))).toHaveLength(before - 1);
    expect(await desk.left(set.revision.id)).toEqual(nothingLeft);
    await analyst.get(`/api/record-sets/${set.id}`).expect(404);
    expect((await desk.journalOf(set.id)).at(-1)?.summary).toContain('so the record set went too');
  });

  it('is refused while an edition of any state rests on it, which is named', async () => {
    const set = await desk.bringIn();
    await desk.draftEdition(await desk.fit(set.revision.id));
    const outlook = await analyst.get(`/api/record-revisions/${set.revision.id}/deletion`);
    expect(outlook.body.editions).toMatchObject([{ estimatorSlug: 'refit-labour', estimatorName: 'Refit labour' }]);
    const refused = await analyst.delete(`/api/record-revisions/${set.revision.id}`);
    expect([refused.status, refused.body.code]).toEqual([409, 'revision-in-use']);
    expect(refused.body.detail).toContain(`edition ${outlook.body.editions[0].number} of Refit labour`);
    expect(await desk.left(set.revision.id)).toMatchObject({ row: 1, columns: 3, blocks: 3, fits: 1 });
  });

  it('cancels a fit that runs, so that its thread never works on records that are gone', async () => {
    const set = await desk.bringIn();
    const fitId = await desk.startFit(set.revision.id);
    const stateOf = async (): Promise<string> => (await service.services.fits.progress(fitId)).state;
    while ((await stateOf()) === 'queued') await new Promise((resolve) => setTimeout(resolve, 5));
    expect(await stateOf()).toBe('running');
    const kept = jest.spyOn(FitQueueStore.prototype, 'finish');
    await analyst.delete(`/api/record-revisions/${set.revision.id}`).expect(204);
    expect(await desk.left(set.revision.id)).toEqual(nothingLeft);
    expect(kept).not.toHaveBeenCalled();
    kept.mockRestore();
    const about = await service.services.knex('journal').where({ subjectId: fitId }).orderBy('id').pluck('action');
    expect(about).toEqual(['fit-started', 'fit-cancelled']);
  });

  it('leaves only cells that nobody speaks of when it is cut short, which hinder no start and are swept', async () => {
    const set = await desk.bringIn();
    const { cellStorage, knex } = service.services;
    const clear = jest.spyOn(cellStorage, 'clear').mockRejectedValueOnce(new Error('killed'));
    await analyst.delete(`/api/record-revisions/${set.revision.id}`).expect(204);
    expect(clear).toHaveBeenCalledTimes(1);
    clear.mockRestore();
    expect(await desk.left(set.revision.id)).toEqual({ ...nothingLeft, blocks: 3 });
    expect(await migrate(knex, migrationsFolder)).toEqual([]);
    await cellStorage.sweep(service.clock.now());
    expect(await desk.left(set.revision.id)).toEqual(nothingLeft);
  });

  it('is for analysts', async () => {
    const set = await desk.bringIn();
    const viewer = await service.as('viewer');
    await viewer.delete(`/api/record-revisions/${set.revision.id}`).expect(403);
    await viewer.patch(`/api/record-sets/${set.id}`).send({ name: 'Mine' }).expect(403);
    await analyst.delete('/api/record-revisions/0000000000000000').expect(404);
  });
});
