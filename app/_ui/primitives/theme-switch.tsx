'use client';
import { useState } from 'react';
import { buttonClasses } from './button';
import { Icon } from './icon';
import { themeCookie, type Theme } from './theme';

const order: readonly Theme[] = ['system', 'light', 'dark'];
const words: Record<Theme, string> = { system: 'as the system', light: 'light', dark: 'dark' };

function apply(theme: Theme) {
  const root = document.documentElement;
  if (theme === 'system') delete root.dataset.theme;
  else root.dataset.theme = theme;
  document.cookie = `${themeCookie}=${theme}; path=/; max-age=31536000; samesite=lax`;
}

/** The choice lives in a cookie, so the server paints the right theme at once and no inline script is needed. */
export function ThemeSwitch({ theme }: { readonly theme: Theme }) {
  const [now, setNow] = useState(theme);
  const turn = () => {
    const next = order[(order.indexOf(now) + 1) % order.length] ?? 'system';
    setNow(next);
    apply(next);
  };
  return (
    <button type="button" className={buttonClasses('quiet', 'low')} onClick={turn} aria-label={`Theme: ${words[now]}; change`} title={`Theme: ${words[now]}`}>
      <Icon name="half" />
    </button>
  );
}
