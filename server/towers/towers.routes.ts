import { slug } from '@shared/api/common';
import { sensorsPath, towersPath, trendQuery } from '@shared/api/sensors';
import { Router } from 'express';
import * as z from 'zod';
import { requirePermission } from '../access/require';
import { parseRequest } from '../http/parse-request';
import type { SensorViews } from './sensor-views';

const sensorId = z.object({ id: slug });

export function towersRouter(views: SensorViews): Router {
  const router = Router();
  router.get(towersPath, requirePermission('look'), async (_req, res) => {
    res.json(await views.towers());
  });
  router.get(sensorsPath, requirePermission('look'), async (_req, res) => {
    res.json(await views.list());
  });
  router.get(`${sensorsPath}/:id`, requirePermission('look'), async (req, res) => {
    res.json(await views.byId(parseRequest(sensorId, req.params).id));
  });
  router.get(`${sensorsPath}/:id/trend`, requirePermission('look'), async (req, res) => {
    const { id } = parseRequest(sensorId, req.params);
    res.json(await views.trend(id, parseRequest(trendQuery, req.query)));
  });
  return router;
}
