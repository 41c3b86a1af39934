'use client';
/**
 * The composer: one form over one claim sheet. It saves itself, keeps what the server did not take,
 * and leaves computing and judging to the check.
 */
import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'next/navigation';
import { useCallback, useEffect, useMemo, useRef, useState, type ReactNode } from 'react';
import { useForm, type FieldPath } from 'react-hook-form';
import { LinkButton } from '@/app/_ui/primitives/link-button';
import { OfflineStrap } from '@/app/_ui/primitives/offline-strap';
import { Notice } from '@/app/_ui/primitives/notice';
import { Button } from '@/app/_ui/primitives/button';
import { Trouble } from '../../act-parts';
import { say } from '@/app/_ui/primitives/toaster';
import type { FindingAnswer } from '@/lib/services/submissions/finding-answers';
import type { UploadView } from '@/lib/services/files/upload-view';
import type { AuthorView, DraftSheet, FileView } from '@/lib/services/submissions/submission-view';
import type { SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';
import { isUnderWay } from '@/lib/services/runs/under-way';
import type { NamedFile } from '../../preview/preview-message';
import { CheckPart } from './check-part';
import type { CheckSummary } from './check-summary';
import { ClaimsPart } from './claims-part';
import { composerSchema } from './composer-schema';
import { ConflictView } from './conflict-view';
import { FromEarlier } from './earlier-parts';
import { fieldsFromSheet, type ComposerFields } from './fields';
import { FilesPart } from './files-part';
import type { Fix } from './fixes';
import { goToField } from './form-error';
import { KeptCopy } from './kept-copy';
import { NoisePart } from './noise-part';
import { PartNav } from './part-nav';
import { PeoplePart } from './people-part';
import { PreviewPart } from './preview-part';
import type { QuantityRow } from './quantity-row';
import { forget, useAutosave } from './save-draft';
import { SaveLine } from './save-line';
import { StatementPart, TitleField } from './statement-part';
import { useGuessDesk } from './use-guess-desk';
import { useGuesses } from './use-guesses';
import { useImport } from './use-import';
import { WaveformsPart, type ComposerForm } from './waveform-part';

export interface ComposerProps {
  readonly id: string;
  readonly revision: number;
  readonly version: number;
  readonly sheet: DraftSheet;
  readonly files: readonly FileView[];
  /** Of one's own, broken off. */
  readonly uploads: readonly UploadView[];
  readonly authors: readonly AuthorView[];
  readonly you: string;
  readonly stateWords: string;
  readonly catalogue: readonly QuantityRow[];
  readonly check: CheckSummary | null;
  readonly beforeLodging: readonly string[];
  /** The authors' words on findings and guesses. */
  readonly answers: readonly FindingAnswer[];
  /** The record's own table with the numbers of the latest check, drawn on the server. */
  readonly children: ReactNode;
}

function useComposer({ id, version, sheet, check }: ComposerProps) {
  const router = useRouter();
  const initial = useMemo(() => fieldsFromSheet(sheet), []); // eslint-disable-line react-hooks/exhaustive-deps -- later sheets are saves of this very form
  const form = useForm<ComposerFields>({ defaultValues: initial, resolver: zodResolver(composerSchema), mode: 'onBlur', reValidateMode: 'onChange' });
  const saving = useAutosave(id, version, form, isUnderWay(check));
  const { state } = saving;
  const before = useRef(state.kind);
  useEffect(() => {
    // What stands in the way of lodging is the server's word on what it has.
    if (state.kind === 'saved' && before.current === 'saving') router.refresh();
    before.current = state.kind;
  }, [state.kind, router]);
  const set = useCallback((field: string, value: string) => form.setValue(field as FieldPath<ComposerFields>, value as never, { shouldDirty: true, shouldTouch: true, shouldValidate: true }), [form]);
  const applyFix = useCallback((fix: Fix) => {
    set(fix.field, fix.value);
    say(`${fix.words}. Check again to see what it changes.`);
  }, [set]);
  const go = useCallback((field: string) => {
    if (field.includes('.settings.') && form.getValues(field as FieldPath<ComposerFields>) === undefined) set(field, '');
    requestAnimationFrame(() => goToField(field));
  }, [form, set]);
  const take = (fields: ComposerFields) => form.reset(fields);
  // As an edit: the baseline stays, so that it is saved like anything typed.
  const put = useCallback((fields: ComposerFields) => form.reset(fields, { keepDefaultValues: true }), [form]);
  return { form, saving, applyFix, go, take, put };
}

const noGuesses: readonly SheetGuess[] = [];

export function Composer(props: ComposerProps) {
  const { id, files, children } = props;
  const { form, saving, applyFix, go, take, put } = useComposer(props);
  const importing = useImport(form, put);
  const [given, setGiven] = useState<ReadonlyMap<string, Blob>>(new Map());
  const give = (some: readonly NamedFile[]) => setGiven((now) => new Map([...now, ...some.map(({ name, file }) => [name, file] as const)]));
  const names = files.map((f) => f.name);
  const guesses = useGuesses(form, given, files, props.check?.guesses ?? noGuesses);
  const { desk, trouble } = useGuessDesk({ id, form, guesses, answers: props.answers, saveNow: saving.saveNow });
  const keepMine = (version: number) => { saving.takeVersion(version); void saving.saveNow(); };
  const takeTheirs = (version: number, sheet: DraftSheet) => { saving.takeVersion(version); take(fieldsFromSheet(sheet)); forget(id); void saving.saveNow(); };
  return (
    <div className="wrap pb-16">
      <Head {...props} form={form} save={saving.state} />
      <div className="grid gap-3">
        <OfflineStrap>What you write is kept in this browser and is sent when the connection is back.</OfflineStrap>
        <KeptCopy id={id} form={form} onUse={take} />
        {saving.state.kind === 'conflict' && <ConflictView id={id} why={saving.state.why} mine={form.getValues} onKeep={keepMine} onTake={takeTheirs} />}
        {saving.state.kind === 'kept-here' && <Notice kind="stop" live="alert" word="Not saved" actions={<Button size="low" onClick={() => void saving.saveNow()}>Save now</Button>}><p>{saving.state.why}</p></Notice>}
      </div>
      <div className="mt-6 grid items-start gap-6 mid:grid-cols-[minmax(0,1fr)_360px]">
        <div className="grid min-w-0 gap-10">
          <PartNav form={form} files={files.length} />
          <Part id="files" title="Files"><FilesPart id={id} files={files} uploads={props.uploads} usedBy={(name) => usersOf(form, name)} onGiven={give} importing={importing} /></Part>
          <Part id="waveforms" title="Waveforms"><WaveformsPart id={id} form={form} stored={files} desk={desk} /><Trouble trouble={trouble} /></Part>
          <Part id="noise" title="Noise curves"><NoisePart form={form} files={names} desk={desk} /><div className="mt-2"><FromEarlier id={id} form={form} files={files} put={put} /></div></Part>
          <Part id="claims" title="Claims"><ClaimsPart form={form} catalogue={props.catalogue} verdicts={props.check?.numbers?.current ? props.check.verdicts : []} /></Part>
          <Part id="preview" title="First look"><PreviewPart id={id} form={form} files={files} given={given} onGiven={give} /></Part>
          <Part id="statement" title="Statement"><StatementPart form={form} /></Part>
          <Part id="people" title="People"><PeoplePart id={id} authors={props.authors} you={props.you} /></Part>
        </div>
        <div className="min-w-0 mid:sticky mid:top-[72px] mid:max-h-[calc(100dvh-88px)] mid:overflow-y-auto" tabIndex={-1}>
          <CheckPart id={id} check={props.check} beforeLodging={props.beforeLodging} isFirstAuthor={props.authors.some((a) => a.userId === props.you && a.role === 'author')} save={saving.state} saveNow={saving.saveNow} fields={form.getValues} onFix={applyFix} onGo={go} />
        </div>
      </div>
      {children}
    </div>
  );
}

function Head({ id, revision, stateWords, form, save }: ComposerProps & { readonly form: ComposerForm; readonly save: ReturnType<typeof useAutosave>['state'] }) {
  return (
    <div className="grid gap-4 pt-10 pb-6">
      <p className="flex flex-wrap items-center gap-x-2.5 text-ui text-ink-2"><LinkButton href="/submissions" tone="quiet" size="low" className="-ml-2">Submissions</LinkButton><span aria-hidden>/</span><span>revision {revision}, {stateWords}</span></p>
      <div className="flex flex-wrap items-baseline gap-x-6 gap-y-2">
        <h1 className="min-w-0 [overflow-wrap:anywhere]">{form.watch('title').trim() || 'Untitled draft'}</h1>
        <SaveLine state={save} />
        <span className="ml-auto"><LinkButton href={`/api/v1/submissions/${id}/sheet`} download size="low">Export claim.json</LinkButton></span>
      </div>
      <div className="max-w-measure"><TitleField form={form} /></div>
    </div>
  );
}

function Part({ id, title, children }: { readonly id: string; readonly title: string; readonly children: ReactNode }) {
  return (
    <section id={id} aria-labelledby={`${id}-h`} className="min-w-0 scroll-mt-20">
      <h2 id={`${id}-h`} className="mb-3">{title}</h2>
      {children}
    </section>
  );
}

/** Where the sheet uses a file. */
function usersOf(form: ComposerForm, file: string): readonly string[] {
  const waveforms = form.watch('waveforms').filter((w) => w.file === file || Object.values((w.rest['files'] ?? {}) as Record<string, unknown>).includes(file));
  return [...waveforms, ...form.watch('noise').filter((n) => n.kind === 'file' && n.file === file)].map((row) => row.name);
}
