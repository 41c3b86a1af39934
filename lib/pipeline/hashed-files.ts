import type { OpenFile } from '@/lib/formats/open-file';

/** A digest that is fed while bytes pass; injected, since the core has no platform of its own. */
export interface StreamingDigest {
  readonly update: (bytes: Uint8Array) => void;
  readonly hex: () => string | Promise<string>;
}

export interface FileFact {
  readonly name: string;
  readonly bytes: number;
  readonly sha256: string;
}

/** Opens files and hashes each while it is first read, so that no file is read twice for its digest. */
export class HashedFiles {
  private readonly facts = new Map<string, FileFact>();
  private readonly begun: string[] = [];

  constructor(
    private readonly source: OpenFile,
    private readonly digest: () => StreamingDigest,
  ) {}

  readonly open: OpenFile = (name) => {
    if (this.facts.has(name)) return this.source(name);
    if (!this.begun.includes(name)) this.begun.push(name);
    return this.hashing(name);
  };

  /** In the order in which the sheet first needed them; only files that were read to their end. */
  files(): FileFact[] {
    return this.begun.flatMap((name) => this.facts.get(name) ?? []);
  }

  sha256(name: string): string | null {
    return this.facts.get(name)?.sha256 ?? null;
  }

  private async *hashing(name: string): AsyncGenerator<Uint8Array> {
    const digest = this.digest();
    let bytes = 0;
    for await (const chunk of this.source(name)) {
      digest.update(chunk);
      bytes += chunk.length;
      yield chunk;
    }
    this.facts.set(name, { name, bytes, sha256: await digest.hex() });
  }
}
