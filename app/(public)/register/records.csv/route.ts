import { defineRoute } from '@/lib/http/define-route';
import { exportRegister } from '@/lib/services/records/export-register';
import { CSV_SHAPE, csvParts } from '@/lib/services/records/register-csv';
import { askedOfRegister } from '../asked-of-register';
import { addressParamsOf, exportResponse } from '../export-response';

export const runtime = 'nodejs';
export const dynamic = 'force-dynamic';

export const GET = defineRoute({
  door: 'GET /register/records.csv',
  query: askedOfRegister,
  handle: async ({ actor, request }) => {
    const data = await exportRegister(actor, addressParamsOf(request.url), CSV_SHAPE);
    if (!data.ok) return data;
    const body = { type: 'text/csv; charset=utf-8; header=present', disposition: 'attachment; filename="counterfoil-records.csv"', parts: () => csvParts(data.value) };
    return { ok: true as const, value: exportResponse(data.value, request, body) };
  },
  respond: (response) => response,
});
