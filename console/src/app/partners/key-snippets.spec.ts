import { embedMarkup, estimateCommand, listCommand } from './key-snippets';

const place = { service: 'https://desk.example', key: 'tb_partner_abc' };

describe('snippets for a new key', () => {
  it('lists what the key may call', () => {
    expect(listCommand(place)).toBe(
      "curl https://desk.example/v1/estimators \\\n  --header 'X-Api-Key: tb_partner_abc'",
    );
  });

  it('asks for one estimate with the case as JSON', () => {
    const command = estimateCommand(place, 'refit-labour', { length: 12.5 });
    expect(command).toContain('curl https://desk.example/v1/estimators/refit-labour/estimates');
    expect(command).toContain(`--data '{"inputs":{"length":12.5}}'`);
  });

  it('keeps a quote in a case from ending the shell’s quote', () => {
    expect(estimateCommand(place, 'refit-labour', { hull: "builder's ply" })).toContain(String.raw`builder'\''s ply`);
  });

  it('embeds the form with the key, the estimator and the service', () => {
    const page = document.createElement('div');
    page.innerHTML = embedMarkup(place, 'refit-labour');
    const form = page.querySelector('tarebeam-form');
    expect(form?.getAttribute('estimator')).toBe('refit-labour');
    expect(form?.getAttribute('key')).toBe(place.key);
    expect(form?.getAttribute('service')).toBe(place.service);
    expect(page.querySelector('script')?.src).toBe('https://desk.example/widget/tarebeam-form.js');
  });
});
