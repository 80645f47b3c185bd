import { TAG_NAME } from './attributes';

/**
 * The nonce of the page's policy: from the first form that carries one, else from the script element that loaded this file.
 * A browser hides the attribute once it has read it; the property stays.
 */
export function pageNonce(page: Document, scriptAddress: string): string | null {
  const form = page.querySelector<HTMLElement>(`${TAG_NAME}[nonce]`);
  const script = [...page.querySelectorAll<HTMLScriptElement>('script[src]')].find(({ src }) => src === scriptAddress);
  return form?.nonce || form?.getAttribute('nonce') || script?.nonce || null;
}
