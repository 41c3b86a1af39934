/**
 * Parts with no domain words: buttons, fields, frames, states. Whatever knows what a claim is
 * belongs to a neighbour. Parts without 'use client' work in server and client components alike.
 */
import type { ButtonHTMLAttributes, ReactNode } from 'react';
import { classes } from './classes';

export type ButtonTone = 'main' | 'plain' | 'quiet';
export type ButtonSize = 'normal' | 'low' | 'tall';

const tones: Record<ButtonTone, string> = {
  main: 'border-link bg-link text-on-link hover:bg-[color-mix(in_srgb,var(--link)_88%,var(--ink))]',
  plain: 'border-control bg-sheet text-ink hover:bg-hover',
  quiet: 'border-transparent bg-transparent text-link hover:bg-hover',
};
const sizes: Record<ButtonSize, string> = {
  low: 'min-h-8 py-[5px] text-small',
  normal: 'min-h-9 py-[7px] text-ui',
  tall: 'min-h-10 py-[9px] text-ui',
};
const padding = (tone: ButtonTone, size: ButtonSize) => (tone === 'quiet' ? 'px-2' : size === 'tall' ? 'px-[18px]' : size === 'low' ? 'px-2.5' : 'px-3.5');

export const buttonClasses = (tone: ButtonTone = 'plain', size: ButtonSize = 'normal', extra?: string) =>
  classes(
    'inline-flex items-center justify-center gap-2 rounded border font-semibold no-underline transition-colors duration-quick',
    'disabled:border-dashed disabled:border-control disabled:bg-transparent disabled:text-ink-2',
    'aria-disabled:border-dashed aria-disabled:border-control aria-disabled:bg-transparent aria-disabled:text-ink-2',
    tones[tone], sizes[size], padding(tone, size), extra,
  );

export interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  readonly tone?: ButtonTone;
  readonly size?: ButtonSize;
  /** What the button is doing, said in its place; it takes no second click meanwhile. */
  readonly busy?: string | null;
  readonly icon?: ReactNode;
}

export function Button({ tone, size, busy, icon, className, children, onClick, type = 'button', ...rest }: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      className={buttonClasses(tone, size, className)}
      aria-disabled={busy ? true : rest['aria-disabled']}
      onClick={busy ? (event) => event.preventDefault() : onClick}
    >
      {icon}
      {busy ?? children}
    </button>
  );
}
