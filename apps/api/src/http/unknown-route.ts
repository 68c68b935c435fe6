import { problemTypes } from '@trammel/shared/problem';
import type { RequestHandler } from 'express';
import type { ApiRouter } from './api-router.ts';
import { BorderProblem, NotFound } from './problems.ts';

/** What no route took: another method of a known path is 405 with the methods it takes, everything else 404. */
export function noSuchRoute(router: ApiRouter): RequestHandler {
  return (req, _res, next) => {
    const methods = router.methodsOf(req.path);
    if (methods.length === 0) {
      next(new NotFound('There is no such address.'));
      return;
    }
    const allow = methods.join(', ');
    const detail = `This address takes ${allow}.`;
    next(
      new BorderProblem(405, 'Method not allowed', problemTypes.methodNotAllowed, detail, { Allow: allow }),
    );
  };
}
