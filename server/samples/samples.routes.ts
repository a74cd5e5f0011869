import { newSample, samplesPath, samplesQuery } from '@shared/api/samples';
import { Router } from 'express';
import * as z from 'zod';
import { currentUser } from '../access/current-user';
import { requirePermission } from '../access/require';
import { parseRequest } from '../http/parse-request';
import type { SampleIntake } from './sample-intake';
import type { SampleViews } from './sample-views';

const sampleId = z.object({ id: z.coerce.number().int().positive() });

export function samplesRouter(intake: SampleIntake, views: SampleViews): Router {
  const router = Router();
  router.get(samplesPath, requirePermission('look'), async (req, res) => {
    res.json(await views.list(parseRequest(samplesQuery, req.query)));
  });
  router.get(`${samplesPath}/:id`, requirePermission('look'), async (req, res) => {
    res.json(await views.byId(parseRequest(sampleId, req.params).id));
  });
  router.post(samplesPath, requirePermission('enterSamples'), async (req, res) => {
    const outcome = await intake.record(parseRequest(newSample, req.body), currentUser(req));
    res
      .status(outcome.alreadyThere ? 200 : 201)
      .location(`${samplesPath}/${outcome.sample.id}`)
      .json(outcome);
  });
  return router;
}
