import { renderToStaticMarkup } from 'react-dom/server';
import { createElement } from 'react';
import { describe, expect, it } from 'vitest';
import { Prose } from '@/app/_ui/math/render-markdown';
import { Formula } from '@/app/_ui/math/formula';

const html = (source: string) => renderToStaticMarkup(createElement(Prose, { source }));

describe('a statement or comment', () => {
  it('sets inline and display maths on the server, with MathML for those who listen', () => {
    const page = html('The match is $\\mathcal M$.\n\n$$\n1-\\mathcal M=\\frac{1}{2\\rho^2}\n$$\n');
    expect(page).toContain('<math');
    expect(page).toContain('katex-display');
    expect(page).toContain('tabindex="0"');
    expect(page).not.toContain('<pre');
  });
  it('keeps tables, lists and links, and starts its headings below the page’s own', () => {
    const page = html('# One\n\n- a\n\n| x | y |\n|---|---|\n| 1 | 2 |\n\n[source](https://site.example/a)');
    expect(page).toContain('<h3');
    expect(page).not.toContain('<h1');
    expect(page).toMatch(/tabindex="0"[^>]*role="group"[^>]*><table/i);
    expect(page).toContain('rel="nofollow noopener noreferrer ugc"');
  });

  const hostile: readonly (readonly [what: string, source: string, never: RegExp])[] = [
    ['a script element', 'a <script>alert(1)</script> b', /<script/i],
    ['an event handler', '<img src=x onerror=alert(1)> <b onclick="alert(1)">x</b>', /onerror=|onclick=|<img/i],
    ['a javascript address', '[x](javascript:alert(1)) [y](JaVaScRiPt:alert(1)) [z](data:text/html,x)', /href="(javascript|data)/i],
    ['an image that would call on a stranger', '![x](https://site.example/pixel.png)', /<img|pixel\.png"/i],
    ['a style that would cover the page', '<div style="position:fixed;inset:0">x</div>', /position:fixed/i],
    ['an id that would stand in for one of ours', '<a name="main" id="main">x</a>\n\n[^1]: note', /id="main"/i],
    ['a formula that would link', '$\\href{javascript:alert(1)}{x}$ $\\url{https://site.example}$', /<a /i],
    ['a formula that would include a picture', '$\\includegraphics{https://site.example/x.png}$', /<img|src=/i],
    ['a formula that would set its own attributes', '$\\htmlData{x=1}{y}$ $\\htmlId{main}{y}$ $\\htmlStyle{position:fixed}{y}$ $\\htmlClass{perf}{y}$', /data-x=|id="main"|style="position:fixed|class="[^"]*\bperf\b/i],
    ['a frame, an object, a form', '<iframe src="https://site.example"></iframe><object></object><form action="/x"><button>y</button></form>', /<(iframe|object|form|button)/i],
    ['a base or a refresh', '<base href="https://site.example"><meta http-equiv="refresh" content="0">', /<(base|meta)/i],
  ];
  it.each(hostile)('drops %s', (_what, source, never) => {
    expect(html(source)).not.toMatch(never);
  });

  it('bounds what a macro may expand to, and what one formula may weigh', () => {
    const bomb = '$\\def\\a{\\b\\b\\b\\b}\\def\\b{\\c\\c\\c\\c}\\def\\c{\\d\\d\\d\\d}\\def\\d{xxxx}\\a\\a\\a\\a$';
    expect(html(bomb).length).toBeLessThan(20_000);
    const long = `$${'x'.repeat(2001)}$`;
    expect(html(long)).toContain('unset-math');
    expect(html(long)).not.toContain('katex');
  });
  it('stays under a megabyte and a half when made of nothing but heavy formulas', () => {
    const heavy = `$${'\\sqrt{}'.repeat(280)}$`;
    const page = html(Array.from({ length: 49 }, () => heavy).join('\n\n'));
    expect(page.length).toBeLessThan(1_500_000);
    expect(page).toContain('unset-math');
  });
  it('survives deep nesting and broken maths', () => {
    expect(html(`$${'{'.repeat(900)}x${'}'.repeat(900)}$`)).toContain('x');
    expect(html('> '.repeat(300) + 'deep')).toContain('deep');
    expect(html('$\\frac{1$ and $$ and $\\undefined$')).toContain('undefined');
  });
  it('shows a formula of ours with the same restraint', () => {
    expect(renderToStaticMarkup(createElement(Formula, { tex: '\\href{javascript:alert(1)}{x}' }))).not.toMatch(/<a[\s>]/);
  });
});
