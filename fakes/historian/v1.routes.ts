import { Router } from 'express';
import {
  type HistorianLatest,
  historianLatestRequest,
  type HistorianRaw,
  historianRawRequest,
  type HistorianTagPage,
  historianTagsQuery,
  type HistorianWritten,
  historianPaths,
  historianWriteRequest,
  statusCodes,
} from '@shared/api/historian';
import { parseInput } from '../http/problem';
import type { Archive } from './archive';
import { readContinuation, writeContinuation } from './continuation';

/** The historian's contract; see README.md beside this file. `now` brings the simulation up to date and says the time. */
export function v1Router(archive: Archive, now: () => number): Router {
  const router = Router();

  router.get(historianPaths.tags, (req, res) => {
    const { search, cursor, limit } = parseInput(historianTagsQuery, req.query);
    const part = search?.toLowerCase() ?? '';
    const found = archive
      .tags()
      .filter(({ name, description }) => `${name}\n${description}`.toLowerCase().includes(part))
      // The cursor is the last name given: tags that come or go between pages shift nothing.
      .filter(({ name }) => cursor === undefined || name > cursor);
    const tags = found.slice(0, limit);
    const page: HistorianTagPage = { tags, next: found.length > limit ? tags.at(-1)!.name : null };
    res.json(page);
  });

  router.post(historianPaths.latest, (req, res) => {
    const { tags } = parseInput(historianLatestRequest, req.body);
    const time = now();
    const answer: HistorianLatest = { values: tags.map((tag) => archive.latest(tag, time)) };
    res.json(answer);
  });

  router.post(historianPaths.raw, (req, res) => {
    const question = parseInput(historianRawRequest, req.body);
    const { tags, from, to, limit, continuation } = question;
    const starts = continuation == null ? tags.map(() => from) : readContinuation(question, continuation);
    const time = now();
    const next: (number | null)[] = [];
    const series = tags.map((tag, i) => {
      const start = starts[i] ?? null;
      const isKnown = archive.has(tag);
      const result = isKnown ? statusCodes.Good : statusCodes.Bad_NodeIdUnknown;
      if (start === null || !isKnown) {
        next.push(null);
        return { tag, result, t: [], value: [], status: [] };
      }
      const stretch = archive.stretch(tag, start, to, limit, time);
      next.push(stretch.next);
      return { tag, result, t: stretch.t, value: stretch.value, status: stretch.status };
    });
    const answer: HistorianRaw = {
      series,
      continuation: next.every((start) => start === null) ? null : writeContinuation(question, next),
    };
    res.json(answer);
  });

  router.post(historianPaths.write, (req, res) => {
    const { values } = parseInput(historianWriteRequest, req.body);
    const answer: HistorianWritten = {
      results: values.map((value) => ({ tag: value.tag, t: value.t, status: archive.write(value) })),
    };
    res.json(answer);
  });

  return router;
}
