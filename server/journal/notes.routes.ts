import { slug } from '@shared/api/common';
import { newNote, notesPath } from '@shared/api/journal';
import { Router } from 'express';
import * as z from 'zod';
import { currentUser } from '../access/current-user';
import { requirePermission } from '../access/require';
import { parseRequest } from '../http/parse-request';
import type { NotesService } from './notes.service';

export const notesQuery = z.object({ sensorId: slug });

export function notesRouter(notes: NotesService): Router {
  const router = Router();
  router.get(notesPath, requirePermission('look'), async (req, res) => {
    res.json(await notes.list(parseRequest(notesQuery, req.query).sensorId));
  });
  router.post(notesPath, requirePermission('writeNotes'), async (req, res) => {
    const note = await notes.write(parseRequest(newNote, req.body), currentUser(req));
    res.status(201).json(note);
  });
  return router;
}
