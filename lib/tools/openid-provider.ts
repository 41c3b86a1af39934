import { startOpenIdProvider } from '@/lib/tools/fakes/openid-provider';
import { endWithParent, requiredVariable } from '@/lib/tools/process';

/** Process of `npm start`: the OpenID provider that stands in for ORCID. */
const provider = await startOpenIdProvider({
  clientId: requiredVariable('ORCID_CLIENT_ID'),
  clientSecret: requiredVariable('ORCID_CLIENT_SECRET'),
  port: Number(new URL(requiredVariable('ORCID_ISSUER')).port),
});
endWithParent(() => provider.stop());
