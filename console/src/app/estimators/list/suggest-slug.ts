/** A public name made from a title: `Refit labour (winter)` to `refit-labour-winter`; at most 64 characters. */
export function suggestSlug(name: string): string {
  return name
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/&/g, ' and ')
    .replace(/[^a-z0-9]+/g, '-')
    .slice(0, 64)
    .replace(/^-+|-+$/g, '');
}

export const slugPattern = /^[a-z0-9]+(-[a-z0-9]+)*$/;
