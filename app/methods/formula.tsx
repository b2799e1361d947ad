import katex from 'katex';
import { createElement, Fragment, type ReactNode } from 'react';
import { SaxesParser } from 'saxes';

interface Open {
  name: string;
  attributes: Record<string, string>;
  children: ReactNode[];
}

/** A formula set on the server from TeX: drawn for the eye, and as MathML for those who listen. Elements are built one by
 *  one, so that no text of it is ever taken for markup.
 *  @throws the parser's error for TeX that is none */
export function Formula({ tex }: { tex: string }): ReactNode {
  const markup = katex.renderToString(tex, { displayMode: true, throwOnError: true, strict: 'error' });
  const parser = new SaxesParser();
  const open: Open[] = [{ name: '', attributes: {}, children: [] }];
  const last = () => open[open.length - 1];
  parser.on('error', (error) => {
    throw error;
  });
  parser.on('opentag', ({ name, attributes }) => {
    open.push({ name, attributes: attributes as Record<string, string>, children: [] });
  });
  parser.on('text', (text) => last().children.push(text));
  parser.on('closetag', () => {
    const { name, attributes, children } = open.pop()!;
    // The TeX source inside is for copying, and would be read out as well.
    if (name !== 'annotation') last().children.push(element(name, attributes, children));
  });
  parser.write(markup).close();
  return createElement(Fragment, null, ...open[0].children);
}

function element(name: string, attributes: Record<string, string>, children: ReactNode[]): ReactNode {
  const { class: className, style, ...rest } = attributes;
  return createElement(
    name,
    { ...rest, ...(className ? { className } : {}), ...(style ? { style: styleOf(style) } : {}) },
    ...children,
  );
}

/** Example: "height:1em;vertical-align:-0.25em" → {height: "1em", verticalAlign: "-0.25em"} */
function styleOf(text: string): Record<string, string> {
  const pairs = text.split(';').filter((pair) => pair.includes(':'));
  return Object.fromEntries(
    pairs.map((pair) => {
      const colon = pair.indexOf(':');
      const name = pair.slice(0, colon).trim();
      return [name.replace(/-([a-z])/g, (_, letter: string) => letter.toUpperCase()), pair.slice(colon + 1).trim()];
    }),
  );
}
