import type { ResultDocument } from '@/lib/pipeline/result';
import { grouped } from '../math/format-number';
import { Hash } from '../primitives/facts';

/** Each file with its size and whole digest. */
export const FileList = ({ files }: { readonly files: ResultDocument['files'] }) => (
  <ul className="grid gap-2 text-ui">
    {files.map((file) => (
      <li key={file.name} className="min-w-0">
        <span className="[overflow-wrap:anywhere]">{file.name}</span> <span className="text-ink-2">· {grouped(String(file.bytes))} bytes</span>
        <br />
        <Hash value={file.sha256} />
      </li>
    ))}
  </ul>
);
