/** Templates of a plant: what the syntax tree lets pass, what it refuses by name and line. */
import { describe, expect, it } from 'vitest';
import { Templates } from '../../src/page/handlebars.ts';
import { UserError } from '../../src/shell/types.ts';

const templates = (source: string): Templates =>
  new Templates(
    new Map([
      ['pdf/own.hbs', source],
      ['shared/cautions.hbs', '{{#each cautions}}<p>{{this}}</p>{{/each}}'],
    ]),
  );

describe('a template', () => {
  it('prints escaped fields, blocks and partials', () => {
    const html = templates('{{#if has}}<p>{{name}}</p>{{else}}none{{/if}}{{> shared/cautions}}').render('pdf/own', {
      has: true,
      name: '<b>"&',
      cautions: ['a < b'],
    });
    expect(html).toBe('<p>&lt;b&gt;&quot;&amp;</p><p>a &lt; b</p>');
  });

  it('has no way to the prototype', () => {
    for (const path of ['constructor.name', 'name.constructor', '__proto__', 'toString', '__defineGetter__']) {
      expect(() => templates(`{{${path}}}`), path).toThrow(/is no field/);
      expect(() => templates(`{{#if ${path}}}x{{/if}}`), path).toThrow(/is no field/);
    }
  });

  it('without the field it prints is refused when it runs', () => {
    expect(() => templates('{{nothing}}').render('pdf/own', { name: 'x' })).toThrow(UserError);
  });

  const refused = {
    'unescaped output': '{{{name}}}',
    'unescaped output by &': '{{&name}}',
    'unescaped output inside a block': '{{#if has}}{{{name}}}{{/if}}',
    'a helper': '{{shout name}}',
    'a block helper': '{{#shout}}x{{/shout}}',
    'a call in brackets': '{{#if (lookup this "name")}}x{{/if}}',
    'a partial that is not there': '{{> shared/secret}}',
    'a partial named at run time': '{{> (lookup this "name")}}',
    'a partial with a block': '{{#> shared/secret}}x{{/shared/secret}}',
    'a partial made inside': '{{#*inline "shared/cautions"}}{{/inline}}',
    'a comment around the cautions': '<!-- {{> shared/cautions}} -->',
    'a comment around the cautions in the other branch': '{{#if has}}x{{else}}<!-- {{> shared/cautions}} -->{{/if}}',
    'what cannot be read': '{{#if has}}',
  };
  for (const [what, source] of Object.entries(refused))
    it(`with ${what} is refused by its name`, () => {
      expect(() => templates(source)).toThrow(UserError);
      expect(() => templates(source)).toThrow(/pdf\/own/);
    });
});
