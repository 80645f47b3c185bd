import { edition, ines, tomas } from '../testing/refit-labour';
import { actionsFor, putInForceRequest, whyNotPutInForce, withdrawalConsequences, type Actor } from './edition-actions';

const analyst: Actor = { id: ines.id, analyst: true, reviewer: false };
const reviewer: Actor = { id: tomas.id, analyst: false, reviewer: true };

describe('what may be done with an edition', () => {
  it.each([
    ['draft', analyst, ['submit']],
    ['draft', reviewer, ['withdraw']],
    ['under-review', reviewer, ['put-in-force', 'send-back', 'withdraw']],
    ['under-review', analyst, []],
    ['in-force', reviewer, ['withdraw']],
    ['superseded', reviewer, ['withdraw']],
    ['withdrawn', reviewer, []],
  ] as const)('%s', (state, actor, actions) => {
    expect(actionsFor({ ...edition, state }, actor)).toEqual(actions);
  });

  it('leaves approval to someone else, and says why', () => {
    expect(whyNotPutInForce({ ...edition, mayPutInForce: true }, reviewer)).toBeUndefined();
    expect(whyNotPutInForce(edition, { ...analyst, reviewer: true })).toContain(
      'You submitted this edition, so someone else must',
    );
    expect(whyNotPutInForce({ ...edition, submittedBy: tomas }, { ...analyst, reviewer: true })).toContain(
      'You drew up this edition',
    );
    expect(whyNotPutInForce(edition, { ...reviewer, id: 'person000else' })).toBe('A reviewer must put it in force.');
  });

  it('names what approval replaces', () => {
    expect(putInForceRequest({ ...edition, number: 5 }, edition).consequences[1]).toContain(
      'Edition 4, in force now, is superseded.',
    );
    expect(putInForceRequest(edition, null).consequences[1]).toContain('first edition');
  });

  it('names whom a withdrawal leaves without an answer', () => {
    expect(withdrawalConsequences(edition)[0]).toContain('Partners that ask for Refit labour get no estimate');
    expect(withdrawalConsequences({ ...edition, state: 'superseded' })[0]).toContain(
      'Partners that pinned this edition',
    );
    expect(withdrawalConsequences({ ...edition, state: 'draft' })[0]).toContain('No partner has seen it');
  });
});
