/** Names of the service's journal that can be chosen on screen; one that is not here is still shown and found by address. */

export const ACTIONS: readonly string[] = [
  'person-invited',
  'invitation-accepted',
  'person-changed',
  'person-closed',
  'person-reopened',
  'signed-in',
  'partner-entered',
  'partner-changed',
  'site-listed',
  'site-taken-off',
  'key-issued',
  'key-revoked',
  'record-set-created',
  'revision-added',
  'estimator-created',
  'estimator-changed',
  'fit-started',
  'fit-cancelled',
  'edition-drafted',
  'edition-submitted',
  'edition-put-in-force',
  'edition-sent-back',
  'edition-withdrawn',
  'settings-changed',
];

export const SUBJECT_KINDS: readonly string[] = ['person', 'partner', 'site', 'key', 'record-set', 'estimator', 'fit', 'edition', 'settings'];
