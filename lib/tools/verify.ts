import { runVerify } from './verify-command';

process.exitCode = await runVerify(process.argv.slice(2), {
  out: (line) => process.stdout.write(`${line}\n`),
  complain: (line) => process.stderr.write(`${line}\n`),
});
