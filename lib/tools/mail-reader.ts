import { startMailReader } from '@/lib/tools/fakes/mail-reader';
import { startMailSink } from '@/lib/tools/fakes/mail-sink';
import { endWithParent, requiredVariable } from '@/lib/tools/process';

/** Process of `npm start`: the SMTP sink and the page that shows its letters. */
const sink = await startMailSink({
  folder: requiredVariable('MAIL_FOLDER'),
  port: Number(new URL(requiredVariable('SMTP_URL')).port),
});
const reader = await startMailReader(sink, Number(new URL(requiredVariable('MAIL_READER_URL')).port));
endWithParent(async () => {
  await Promise.all([sink.stop(), reader.stop()]);
});
