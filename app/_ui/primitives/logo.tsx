/** Two halves meeting at a notch. */
export const Logo = ({ className }: { readonly className?: string }) => (
  <svg viewBox="0 0 32 32" aria-hidden="true" focusable="false" className={className}>
    <path fill="currentColor" d="M2 6h12v6.5l3.6 3.5-3.6 3.500V26H2z" />
    <path fill="none" stroke="currentColor" strokeWidth="2.2" d="M17.3 7.100h11.600v17.800H17.300v-4.200L22 16l-4.7-4.700z" />
  </svg>
);
