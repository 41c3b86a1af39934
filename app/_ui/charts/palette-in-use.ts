'use client';
import { useSyncExternalStore } from 'react';
import { dark, light, type Palette } from '../tokens';

function subscribe(changed: () => void) {
  const system = window.matchMedia('(prefers-color-scheme: dark)');
  const observer = new MutationObserver(changed);
  system.addEventListener('change', changed);
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ['data-theme'] });
  return () => {
    system.removeEventListener('change', changed);
    observer.disconnect();
  };
}

function read(): Palette {
  const chosen = document.documentElement.dataset.theme;
  const isDark = chosen ? chosen === 'dark' : window.matchMedia('(prefers-color-scheme: dark)').matches;
  return isDark ? dark : light;
}

/** Canvases do not follow the style sheet, so plots are told which theme is on. */
export const usePalette = (): Palette => useSyncExternalStore(subscribe, read, () => light);
