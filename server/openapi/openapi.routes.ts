import { Router } from 'express';
import { openToAll } from '../access/require';
import { openApiDocument } from './document';
import { openApiPath } from './operations';

export function openApiRouter(): Router {
  const router = Router();
  let document: string | undefined;
  router.get(openApiPath, openToAll, (_req, res) => {
    document ??= JSON.stringify(openApiDocument());
    res.type('application/json').send(document);
  });
  return router;
}
