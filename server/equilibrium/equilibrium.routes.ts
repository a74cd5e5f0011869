import {
  componentList,
  equilibriumPath,
  flashRequest,
  inferenceRequest,
  saturationRequest,
  vapourPressureRequest,
  type SaturationRequest,
} from '@shared/api/equilibrium';
import { createInference } from '@shared/inference/inference';
import { references, type Reference } from '@shared/references';
import { components } from '@shared/vle/components';
import { bubblePoint, dewPoint, flash, type At, type EquilibriumResult } from '@shared/vle/equilibrium';
import { EquilibriumError } from '@shared/vle/errors';
import { correlationsOf, vapourPressureOf } from '@shared/vle/vapour-pressure';
import { Router } from 'express';
import type * as z from 'zod';
import { requirePermission } from '../access/require';
import { parseRequest } from '../http/parse-request';
import { Problem } from '../http/problem';

/** The equilibrium core over HTTP, for scripts; the desk computes the same in the browser. */
export function equilibriumRouter(): Router {
  const router = Router();
  const look = requirePermission('look');
  router.post(`${equilibriumPath}/bubble-point`, look, (req, res) => {
    const request = parseRequest(saturationRequest, req.body);
    res.json(answered(() => toApi(bubblePoint(request, stateOf(request)))));
  });
  router.post(`${equilibriumPath}/dew-point`, look, (req, res) => {
    const request = parseRequest(saturationRequest, req.body);
    res.json(answered(() => toApi(dewPoint(request, stateOf(request)))));
  });
  router.post(`${equilibriumPath}/flash`, look, (req, res) => {
    const request = parseRequest(flashRequest, req.body);
    res.json(answered(() => toApi(flash(request, request))));
  });
  router.post(`${equilibriumPath}/vapour-pressure`, look, (req, res) => {
    const { id, temperature, correlation } = parseRequest(vapourPressureRequest, req.body);
    res.json(
      answered(() => {
        const used = vapourPressureOf(id, correlation).evaluate(temperature);
        return { pressure: used.pressure, correlation: used.row.id, inRange: used.inRange };
      }),
    );
  });
  router.post(`${equilibriumPath}/inference`, look, (req, res) => {
    const { offset, temperature, pressure, ...model } = parseRequest(inferenceRequest, req.body);
    res.json(
      answered(() => {
        const { groupFraction, composition, sensitivity, clamped, warnings } = createInference(model).infer(
          temperature + offset,
          pressure,
        );
        return {
          groupFraction,
          composition: model.base.map(({ id }, i) => ({ id, fraction: composition[i]! })),
          sensitivity: { temperature: sensitivity.temperature, pressure: sensitivity.pressure },
          clamped,
          warnings,
        };
      }),
    );
  });
  router.get(`${equilibriumPath}/components`, look, (_req, res) => {
    res.json(library);
  });
  return router;
}

const words = (key: string) => references[key as Reference];

/** Every component with where its figures come from. */
const library: z.infer<typeof componentList> = components.map((component) => ({
  ...component,
  criticalSource: words(component.criticalSource),
  normalBoilingPointSource: words(component.normalBoilingPointSource),
  correlations: correlationsOf(component.id).map(({ id, rank, low, high, source }) => ({
    id,
    rank,
    low,
    high,
    source: words(source),
  })),
}));

function stateOf({ temperature, pressure }: SaturationRequest): At {
  return temperature !== undefined ? { temperature } : { pressure: pressure! };
}

function toApi({ kValues: _, ...result }: EquilibriumResult) {
  return result;
}

/** A question without an answer is 422 with what to do; one that makes no sense is 400. */
function answered<T>(compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (!(error instanceof EquilibriumError)) throw error;
    const isAboutThePhysics = error.code === 'no-two-phase-solution' || error.code === 'not-converged';
    throw new Problem(isAboutThePhysics ? 422 : 400, error.code, error.detail);
  }
}
