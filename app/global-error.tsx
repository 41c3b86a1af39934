'use client';
import './globals.css';
import ErrorPage from './error';

/** Stands in when even the frame of the page fails. */
export default function GlobalError(props: { readonly error: Error & { readonly digest?: string }; readonly reset: () => void }) {
  return (
    <html lang="en">
      <body><main><ErrorPage {...props} /></main></body>
    </html>
  );
}
