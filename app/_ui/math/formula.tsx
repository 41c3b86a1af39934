import katex from 'katex';
import { katexOptions } from './katex-options';

const asAttribute = (text: string): string => text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);
const opening = '<span class="katex-display">';

/**
 * A formula of ours, set on the server. The element that scrolls where the column is too narrow is the
 * formula's own, not one around it: that one has to take the keyboard's focus, as in a set text.
 */
export function Formula({ tex, display = false, label = 'Formula' }: { readonly tex: string; readonly display?: boolean; readonly label?: string }) {
  const html = katex.renderToString(tex, { ...katexOptions, displayMode: display });
  if (!display) return <span dangerouslySetInnerHTML={{ __html: html }} />;
  const reachable = html.replace(opening, `${opening.slice(0, -1)} tabindex="0" role="group" aria-label="${asAttribute(label)}">`);
  return <div className="min-w-0" dangerouslySetInnerHTML={{ __html: reachable }} />;
}
