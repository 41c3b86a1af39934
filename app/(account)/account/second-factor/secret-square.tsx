'use client';
import { encode } from 'uqr';

const MARGIN = 2;

/** One path for all dark modules; drawn black on white in both themes, because cameras read nothing else reliably. */
export function SecretSquare({ uri }: { readonly uri: string }) {
  const { data, size } = encode(uri, { border: MARGIN });
  const path = data.flatMap((row, y) => row.flatMap((dark, x) => (dark ? [`M${x} ${y}h1v1h-1z`] : []))).join('');
  const secret = URL.canParse(uri) ? (new URL(uri).searchParams.get('secret') ?? '') : '';
  return (
    <div className="grid gap-3">
      <svg role="img" aria-label="Square code with the secret; the same secret stands beneath it as text" viewBox={`0 0 ${size} ${size}`} shapeRendering="crispEdges" className="w-full max-w-[220px] rounded border border-hair-2">
        <rect width={size} height={size} fill="#fff" />
        <path d={path} fill="#000" />
      </svg>
      <p className="text-ui">Point the authenticator at the square, or type the secret into it:</p>
      <p className="font-code text-code [overflow-wrap:anywhere]" data-secret>{(secret.match(/.{1,4}/g) ?? []).join(' ')}</p>
    </div>
  );
}
