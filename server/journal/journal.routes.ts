import { journalPath, journalQuery } from '@shared/api/journal';
import { Router } from 'express';
import { requirePermission } from '../access/require';
import { parseRequest } from '../http/parse-request';
import type { JournalService } from './journal.service';

export function journalRouter(journal: JournalService): Router {
  const router = Router();
  router.get(journalPath, requirePermission('look'), async (req, res) => {
    res.json(await journal.list(parseRequest(journalQuery, req.query)));
  });
  return router;
}
