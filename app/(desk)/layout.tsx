import type { ReactNode } from 'react';
import { SiteFrame } from '../site-frame';

export default function DeskLayout({ children }: { readonly children: ReactNode }) {
  return <SiteFrame>{children}</SiteFrame>;
}
