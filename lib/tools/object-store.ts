import { ensureBucket } from '@/lib/storage/s3-store';
import { startObjectStoreFake } from '@/lib/tools/fakes/object-store';
import { endWithParent, requiredVariable } from '@/lib/tools/process';

/** Process of `npm start`: the object-store fake, with its bucket. */
const key = { accessKeyId: requiredVariable('S3_ACCESS_KEY_ID'), secretAccessKey: requiredVariable('S3_SECRET_ACCESS_KEY') };
const endpoint = requiredVariable('S3_ENDPOINT');
const store = await startObjectStoreFake({ folder: requiredVariable('OBJECT_STORE_FOLDER'), port: Number(new URL(endpoint).port), ...key });
endWithParent(() => store.stop());
await ensureBucket({
  S3_ENDPOINT: endpoint,
  S3_REGION: requiredVariable('S3_REGION'),
  S3_BUCKET: requiredVariable('S3_BUCKET'),
  S3_ACCESS_KEY_ID: key.accessKeyId,
  S3_SECRET_ACCESS_KEY: key.secretAccessKey,
});
