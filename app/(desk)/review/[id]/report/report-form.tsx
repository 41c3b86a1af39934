'use client';
import { useRouter } from 'next/navigation';
import type { Route } from 'next';
import { useForm } from 'react-hook-form';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextareaField } from '@/app/_ui/primitives/control';
import { CONFIDENCES, RECOMMENDATION_WORDS, RECOMMENDATIONS, REPORT_ANSWER_MAX_CHARACTERS, REPORT_QUESTIONS, type Confidence, type Recommendation, type ReportQuestion } from '@/lib/reviews/report';
import { Trouble } from '../../../act-parts';
import { useAct } from '../../../use-act';
import { handInReport } from '../../actions';
import { useKept } from './use-kept';

export interface ReportFields {
  readonly answers: Record<ReportQuestion, string>;
  readonly recommendation: Recommendation | '';
  readonly confidence: string;
  readonly noteToEditor: string;
}

const empty: ReportFields = { answers: { definition: '', conventions: '', data: '', budget: '', scope: '', candidates: '' }, recommendation: '', confidence: '3', noteToEditor: '' };

/** What is written is kept in this browser until it is handed in. */
export function ReportForm({ submissionId }: { readonly submissionId: string }) {
  const router = useRouter();
  const form = useForm<ReportFields>({ defaultValues: empty });
  const { register, handleSubmit, formState: { errors } } = form;
  const forget = useKept(form, `report:${submissionId}`);
  const { busy, trouble, run } = useAct(handInReport, () => { forget(); router.push(`/review/${submissionId}` as Route); });
  const submit = handleSubmit(async ({ recommendation, confidence, noteToEditor, answers }) => {
    if (recommendation === '') return;
    const note = noteToEditor.trim();
    await run({ id: submissionId, report: { answers, recommendation, confidence: Number(confidence) as Confidence, ...(note ? { noteToEditor: note } : {}) } });
  });
  return (
    <form className="grid gap-6" onSubmit={(e) => void submit(e)} noValidate>
      {REPORT_QUESTIONS.map((q, i) => (
        <TextareaField
          key={q.id}
          label={`${i + 1}. ${q.text}`}
          maxLength={REPORT_ANSWER_MAX_CHARACTERS}
          error={errors.answers?.[q.id] ? 'Write an answer: one sentence is enough.' : undefined}
          hint={q.required ? undefined : 'Leave it empty when there is nothing to say.'}
          {...register(`answers.${q.id}`, { validate: (text) => !q.required || text.trim() !== '' })}
        />
      ))}
      <div className="grid gap-4 sm:grid-cols-2">
        <SelectField label="Recommendation" error={errors.recommendation ? 'Choose one.' : undefined} {...register('recommendation', { required: true })}>
          <option value="">choose one</option>
          {RECOMMENDATIONS.map((r) => <option key={r} value={r}>{RECOMMENDATION_WORDS[r]}</option>)}
        </SelectField>
        <SelectField label="Confidence" hint="1: a guess. 5: certain." {...register('confidence')}>{CONFIDENCES.map((c) => <option key={c} value={c}>{c} of 5</option>)}</SelectField>
      </div>
      <div className="rounded border-[3px] border-ink bg-sheet px-4 py-3">
        <TextareaField label="For the editor only" hint="Never part of the report. Authors and other referees do not see it." maxLength={10_000} {...register('noteToEditor')} />
      </div>
      <p className="max-w-measure text-ui text-ink-2">The authors read your report, under your letter and with the day only, when the editor decides. It cannot be changed afterwards.</p>
      <div><Button type="submit" tone="main" size="tall" busy={busy ? 'Handing it in' : null}>Hand in the report</Button></div>
      <Trouble trouble={trouble} />
    </form>
  );
}
