import type { ReactNode } from 'react';
import { SiteFrame } from '../site-frame';

export default function PublicLayout({ children }: { readonly children: ReactNode }) {
  return <SiteFrame>{children}</SiteFrame>;
}
