import katex from 'katex';
import { katexOptions } from './katex-options';

/** A formula of ours, set on the server. It can be scrolled by keyboard where it is wider than its column. */
export function Formula({ tex, display = false, label = 'Formula' }: { readonly tex: string; readonly display?: boolean; readonly label?: string }) {
  const html = katex.renderToString(tex, { ...katexOptions, displayMode: display });
  if (!display) return <span dangerouslySetInnerHTML={{ __html: html }} />;
  return <div tabIndex={0} role="group" aria-label={label} className="overflow-x-auto" dangerouslySetInnerHTML={{ __html: html }} />;
}
