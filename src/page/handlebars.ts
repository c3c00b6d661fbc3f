/**
 * Handlebars as it is used here: escaping always, strict, no helpers but the built-in block ones, partials by path. A
 * plant's own template is checked on its syntax tree before it runs.
 */
import Handlebars from 'handlebars';
import { UserError } from '../shell/types.ts';
import { hasSentence, type Language, sentenceOf } from '../words/sentences.ts';

const HELPERS: ReadonlySet<string> = new Set(['if', 'unless', 'each', 'with']);

type Render = (model: object) => string;

export class Templates {
  readonly #sources: ReadonlyMap<string, string>;
  readonly #engine = Handlebars.create();
  readonly #compiled = new Map<string, Render>();

  constructor(sources: ReadonlyMap<string, string>, language: Language = 'en') {
    this.#sources = new Map(
      [...sources].map(([path, source]) => [
        path,
        path.endsWith('.hbs') ? withWords(path.replace(/\.hbs$/, ''), source, language) : source,
      ]),
    );
    for (const [path, source] of this.#sources) {
      if (!path.endsWith('.hbs')) continue;
      const name = path.replace(/\.hbs$/, '');
      check(name, source, sources);
      this.#engine.registerPartial(name, source);
    }
  }

  render(name: string, model: object): string {
    let template = this.#compiled.get(name);
    if (template === undefined) {
      const source = this.#sources.get(`${name}.hbs`);
      if (source === undefined) throw new Error(`There is no template ${name}.`);
      template = this.#engine.compile(source, { strict: true, knownHelpersOnly: true, explicitPartialContext: false }) as Render;
      this.#compiled.set(name, template);
    }
    try {
      return template(model);
    } catch (error) {
      throw new UserError(`Template ${name}: ${(error as Error).message}`, 'A template may print only the fields of its view.');
    }
  }

  text(path: string): string {
    const text = this.#sources.get(path);
    if (text === undefined) throw new Error(`There is no file ${path} among the templates.`);
    return text;
  }
}

/** `[[key]]` is the sentence `page.key` of the language, in place before the template is read. */
function withWords(name: string, source: string, language: Language): string {
  return source.replace(/\[\[([^\]\n]*)\]\]/g, (_, key: string, at: number) => {
    if (!hasSentence(language, `page.${key}`))
      throw new UserError(
        `Template ${name}, line ${source.slice(0, at).split('\n').length}: there are no words "${key}".`,
        'The words that a template may use are the page.* keys of templates/words/en/page.json.',
      );
    return sentenceOf(language, `page.${key}`).replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('"', '&quot;');
  });
}

/** Refuses unescaped output, unknown helpers and partials that are not there. */
function check(name: string, source: string, sources: ReadonlyMap<string, string>): void {
  let tree: hbs.AST.Program;
  try {
    tree = Handlebars.parse(source);
  } catch (error) {
    throw new UserError(
      `Template ${name} cannot be read: ${(error as Error).message.split('\n')[0]}`,
      'Mend it, or remove it from templates/ to use the built-in one.',
    );
  }
  const refuse: Refuse = (node, what, hint) => {
    throw new UserError(`Template ${name}, line ${node.loc.start.line}: ${what}.`, hint);
  };
  const visitor = new Handlebars.Visitor();
  holdOutput(visitor, refuse);
  holdCalls(visitor, refuse, sources);
  visitor.accept(tree);
}

type Refuse = (node: hbs.AST.Node, what: string, hint: string) => never;

const KNOWN_HELPERS = 'Only if, unless, each and with are known.';

/** What is printed: escaped fields of the view, and text that is seen. */
function holdOutput(visitor: Handlebars.Visitor, refuse: Refuse): void {
  visitor.MustacheStatement = (mustache) => {
    if (!mustache.escaped) refuse(mustache, 'output must be escaped', 'Write {{name}}, never {{{name}}} or {{&name}}.');
    if (mustache.params.length > 0) refuse(mustache, 'there is no such helper', KNOWN_HELPERS);
    Handlebars.Visitor.prototype.MustacheStatement.call(visitor, mustache);
  };
  visitor.PathExpression = (path) => {
    const foreign = path.parts.find((part) => part in Object.prototype);
    if (foreign !== undefined) refuse(path, `"${foreign}" is no field`, 'A template may print only the fields of its view.');
  };
  // Cautions inside a comment would be in the page and yet not be seen.
  visitor.ContentStatement = (content) => {
    if (content.value.includes('<!--')) refuse(content, 'HTML comments are not allowed', 'Write {{! … }}, which is not printed.');
  };
}

/** What is called: the four block helpers, and partials that are there. */
function holdCalls(visitor: Handlebars.Visitor, refuse: Refuse, sources: ReadonlyMap<string, string>): void {
  visitor.BlockStatement = (block) => {
    const helper = (block.path as hbs.AST.PathExpression).original;
    if (!HELPERS.has(helper)) refuse(block, `there is no helper "${helper}"`, KNOWN_HELPERS);
    Handlebars.Visitor.prototype.BlockStatement.call(visitor, block);
  };
  visitor.PartialStatement = (partial) => {
    const called = (partial.name as hbs.AST.PathExpression).original;
    if (!sources.has(`${called}.hbs`))
      refuse(partial, `there is no partial "${called}"`, 'Partials are named by their path, such as shared/cautions.');
  };
  visitor.SubExpression = (call) => refuse(call, 'nothing may be called in brackets', 'Print the fields of the view as they are.');
  visitor.PartialBlockStatement = (partial) => refuse(partial, 'a partial takes no block', 'Write {{> shared/cautions}}.');
  visitor.DecoratorBlock = (decorator) =>
    refuse(decorator, 'no partial may be made inside a template', 'Put it into a file of its own in templates/.');
}
