import { readFile } from 'node:fs/promises';
import path from 'node:path';
import type { Metadata } from 'next';
import Link from 'next/link';
import { connection } from 'next/server';
import { cache } from 'react';
import { OPERATIONS } from '@/lib/http/contract/operations';
import { EXPLAINED_PROBLEMS } from '@/lib/http/problem-meanings';
import { Prose } from '@/app/_ui/math/render-markdown';
import { Table } from '@/app/_ui/primitives/table';
import { describeOperation } from './describe-operation';
import { OperationPart } from './operation-part';

export const metadata: Metadata = { title: 'Interface' };

const readText = cache(async () => (await readFile(path.join(process.cwd(), 'content', 'interface.md'), 'utf8')).replace(/^#\s+.+\n/, ''));

export default async function Interface() {
  await connection();
  const operations = OPERATIONS.map(describeOperation);
  return (
    <div className="wrap pt-10">
      <h1 className="mb-4">Interface</h1>
      <Prose source={await readText()} firstHeading={2} />
      <section className="mt-10" aria-labelledby="calls-h">
        <h2 id="calls-h" className="mb-3">Every call</h2>
        <Table caption="Every call of version 1" className="min-w-[640px]">
          <thead><tr><th scope="col">Call</th><th scope="col">Does</th><th scope="col">Scope</th></tr></thead>
          <tbody>
            {operations.map((operation) => (
              <tr key={operation.id}>
                <th scope="row"><a href={`#${operation.id}`} className="inline-flex min-h-8 items-center font-code text-code [overflow-wrap:anywhere]">{operation.door}</a></th>
                <td>{operation.summary}</td>
                <td className="whitespace-nowrap">{operation.scope}</td>
              </tr>
            ))}
          </tbody>
        </Table>
      </section>
      <section className="mt-10" aria-labelledby="parts-h">
        <h2 id="parts-h" className="mb-1">Call by call</h2>
        {operations.map((operation) => <OperationPart key={operation.id} operation={operation} />)}
      </section>
      <section className="mt-10" aria-labelledby="problems-h">
        <h2 id="problems-h" className="mb-3">Kinds of refusal</h2>
        <Table caption="Kinds of refusal" className="min-w-[560px]">
          <thead><tr><th scope="col">type</th><th scope="col">Status</th><th scope="col">Means</th></tr></thead>
          <tbody>
            {EXPLAINED_PROBLEMS.map(({ code, status, title }) => (
              <tr key={code}><th scope="row"><Link href={`/problems/${code}`} className="inline-flex min-h-8 items-center font-code text-code">/problems/{code}</Link></th><td>{status}</td><td>{title}</td></tr>
            ))}
          </tbody>
        </Table>
      </section>
    </div>
  );
}
