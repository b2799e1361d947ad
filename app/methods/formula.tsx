import katex from 'katex';
import { createElement, type ReactNode } from 'react';
import { SaxesParser } from 'saxes';

interface Open {
  name: string;
  attributes: Record<string, string>;
  children: ReactNode[];
}

/** A formula as MathML, which browsers set by themselves and screen readers speak. Made on the server from TeX; elements
 *  are built one by one, so that no text of it is ever taken for markup.
 *  @throws the parser's error for TeX that is none */
export function Formula({ tex }: { tex: string }): ReactNode {
  const markup = katex.renderToString(tex, {
    output: 'mathml',
    displayMode: true,
    throwOnError: true,
    strict: 'error',
  });
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
    // The TeX source inside is for copying, and would be read out twice.
    if (name !== 'annotation') last().children.push(element(name, attributes, children));
  });
  parser.write(markup).close();
  return open[0].children;
}

function element(name: string, attributes: Record<string, string>, children: ReactNode[]): ReactNode {
  const { class: className, style: _, ...rest } = attributes;
  return createElement(name, { ...rest, ...(className ? { className } : {}) }, ...children);
}
