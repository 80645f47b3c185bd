import type { Inputs } from '../api/contract';

/** The widget's file, as the service hands it out. */
const WIDGET_PATH = '/widget/tarebeam-form.js';

export interface SnippetPlace {
  /** Where the service is reached, such as https://desk.example. */
  readonly service: string;
  readonly key: string;
}

/** Lists what the key may call, with each estimator's inputs. */
export function listCommand({ service, key }: SnippetPlace): string {
  return [`curl ${service}/v1/estimators \\`, `  --header 'X-Api-Key: ${key}'`].join('\n');
}

/** Asks for one estimate of the given case. */
export function estimateCommand({ service, key }: SnippetPlace, estimator: string, inputs: Inputs): string {
  return [
    `curl ${service}/v1/estimators/${estimator}/estimates \\`,
    `  --header 'X-Api-Key: ${key}' \\`,
    `  --header 'Content-Type: application/json' \\`,
    `  --data '${shellQuoted(JSON.stringify({ inputs }))}'`,
  ].join('\n');
}

export function embedMarkup({ service, key }: SnippetPlace, estimator: string): string {
  return [
    `<script type="module" src="${service}${WIDGET_PATH}"></script>`,
    `<tarebeam-form estimator="${estimator}" key="${key}" service="${service}"></tarebeam-form>`,
  ].join('\n');
}

/** Inside single quotes a POSIX shell ends the quote at the next one, so it is closed, escaped and opened again. */
function shellQuoted(text: string): string {
  return text.replaceAll("'", String.raw`'\''`);
}
