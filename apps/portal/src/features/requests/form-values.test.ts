import { saveRequestRequest } from '@trammel/shared/requests';
import { describe, expect, it } from 'vitest';
import { aRequest } from '../../testing/submissions.ts';
import { bodyOf, emptyRequest, refusalsOf, valuesOf } from './form-values.ts';

describe('the request form', () => {
  it('turns a request into what is typed and back without a change', () => {
    const request = aRequest();
    const body = saveRequestRequest.parse(bodyOf(valuesOf(request)));
    expect(body).toMatchObject({
      streams: request.streams,
      piecesPerStream: 3,
      reviewerIds: [request.reviewers[0]?.id],
      siteId: request.site.id,
    });
    expect(body).not.toHaveProperty('partId');
  });

  it('says of an empty form what is missing, once a field and in words', () => {
    const checked = saveRequestRequest.safeParse(bodyOf({ ...emptyRequest, piecesPerStream: '2.5' }));
    expect(checked.success).toBe(false);
    const refusals = refusalsOf(checked.error?.issues ?? []);
    expect(refusals).toContainEqual({ field: 'supplierId', message: 'Choose a supplier.' });
    expect(refusals).toContainEqual({
      field: 'piecesPerStream',
      message: 'Write a whole number of pieces, 1 to 300.',
    });
    const fields = refusals.map((refusal) => refusal.field);
    expect(new Set(fields).size).toBe(fields.length);
  });
});
