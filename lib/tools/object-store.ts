import { startObjectStoreFake } from '@/lib/tools/fakes/object-store';
import { endWithParent, requiredVariable } from '@/lib/tools/process';

/** Process of `npm start`: the object-store fake. */
const store = await startObjectStoreFake({
  folder: requiredVariable('OBJECT_STORE_FOLDER'),
  port: Number(new URL(requiredVariable('S3_ENDPOINT')).port),
  accessKeyId: requiredVariable('S3_ACCESS_KEY_ID'),
  secretAccessKey: requiredVariable('S3_SECRET_ACCESS_KEY'),
});
endWithParent(() => store.stop());
