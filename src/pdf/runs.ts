/** Tokens of a line → what is drawn together: groups under one mark, and in them runs of words, marks and page numbers. */
import type { Token, Word } from './inline.ts';
import type { Node } from './tags.ts';

/** Neighbouring tokens of one node. */
export function groupsOf(tokens: readonly Token[]): { readonly node: Node | null; readonly tokens: Token[] }[] {
  const groups: { node: Node | null; tokens: Token[] }[] = [];
  for (const token of tokens) {
    const last = groups[groups.length - 1];
    if (last !== undefined && last.node === token.node) last.tokens.push(token);
    else groups.push({ node: token.node, tokens: [token] });
  }
  return groups;
}

export type Run =
  | { readonly kind: 'words'; readonly words: Word[]; width: number }
  | { readonly kind: 'mark'; readonly token: Extract<Token, { kind: 'mark' }>; readonly width: number }
  | { readonly kind: 'page'; readonly token: Extract<Token, { kind: 'page' }>; readonly width: number };

export function runsOf(tokens: readonly Token[]): Run[] {
  const runs: Run[] = [];
  for (const token of tokens) {
    if (token.kind === 'break') continue;
    if (token.kind === 'mark') runs.push({ kind: 'mark', token, width: token.width });
    else if (token.kind === 'page') runs.push({ kind: 'page', token, width: token.width });
    else {
      const word = token.kind === 'space' ? token.word : token;
      const last = runs[runs.length - 1];
      if (last?.kind === 'words') {
        last.words.push(word);
        last.width += word.width;
      } else runs.push({ kind: 'words', words: [word], width: word.width });
    }
  }
  return runs;
}
