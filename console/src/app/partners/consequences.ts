import type { Key, Site } from '../api/contract';
import { countOf } from '../ui/figure';
import { formatMoment } from '../ui/moment';

/** What taking a site off the list, or revoking a key, will do and to whom, a sentence each. */

export function siteConsequences(site: Site, sites: readonly Site[], keys: readonly Key[]): readonly string[] {
  const embedKeys = keys.filter(({ kind, state }) => kind === 'embed' && state === 'live');
  const others = sites.filter(({ id }) => id !== site.id);
  const pages =
    embedKeys.length > 0
      ? `Forms on pages of ${site.origin} stop answering at once. They use ${named(embedKeys)}.`
      : `Pages of ${site.origin} can no longer use an embed key. None is live now.`;
  const elsewhere =
    others.length > 0
      ? `Pages of ${joined(others.map(({ origin }) => origin))} go on as before.`
      : 'No other site is listed, so embed keys are then answered nowhere.';
  return [pages, elsewhere, 'Partner keys are not touched.'];
}

export function keyConsequences(key: Key, sites: readonly Site[]): readonly string[] {
  return [
    key.kind === 'embed' ? pagesOf(sites) : 'Every call that a server makes with this key is refused at once.',
    useOf(key),
    'This cannot be taken back. To change over without a break, issue a new key first.',
  ];
}

function pagesOf(sites: readonly Site[]): string {
  const places = sites.length > 0 ? ` on ${joined(sites.map(({ origin }) => origin))}` : '';
  return `Every form that carries this key${places} stops answering at once.`;
}

function useOf({ lastUsedAt, usedThisMonth }: Key): string {
  if (lastUsedAt === null) return 'It has never been used.';
  return `It was last used on ${formatMoment(lastUsedAt)}, and for ${countOf(usedThisMonth, 'estimate')} this month.`;
}

function named(keys: readonly Key[]): string {
  return `the embed ${keys.length === 1 ? 'key' : 'keys'} ${joined(keys.map(({ label }) => `“${label}”`))}`;
}

function joined(words: readonly string[]): string {
  return new Intl.ListFormat('en-GB', { type: 'conjunction' }).format(words);
}
