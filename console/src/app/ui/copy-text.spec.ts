import { TestBed } from '@angular/core/testing';
import { Announcer } from './announcer';
import { CopyText } from './copy-text';

function withClipboard(writeText: ((text: string) => Promise<void>) | undefined): void {
  Object.defineProperty(navigator, 'clipboard', { configurable: true, value: writeText && { writeText } });
}

async function copyTheKey() {
  const fixture = TestBed.createComponent(CopyText);
  fixture.componentRef.setInput('label', 'The key');
  fixture.componentRef.setInput('text', 'tb_partner_abc');
  await fixture.whenStable();
  const host: HTMLElement = fixture.nativeElement;
  host.querySelector<HTMLButtonElement>('button[aria-label="Copy: The key"]')?.click();
  await fixture.whenStable();
  return host;
}

describe('CopyText', () => {
  afterEach(() => withClipboard(undefined));

  it('copies the text and says so', async () => {
    const writeText = jest.fn(() => Promise.resolve());
    withClipboard(writeText);
    const host = await copyTheKey();
    expect(writeText).toHaveBeenCalledWith('tb_partner_abc');
    expect(host.textContent).toContain('Copied');
    expect(TestBed.inject(Announcer).text()).toBe('The key: Copied');
  });

  it.each([
    ['there is no clipboard', undefined],
    ['the clipboard is refused', () => Promise.reject(new Error('denied'))],
  ])('selects the text for the person to copy when %s', async (_when, writeText) => {
    withClipboard(writeText);
    const host = await copyTheKey();
    expect(host.textContent).toContain('Selected: copy it with Ctrl+C');
    expect(getSelection()?.toString()).toContain('tb_partner_abc');
  });
});
