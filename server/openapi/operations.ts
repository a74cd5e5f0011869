import { sampleOutcome, newSample, sample, samplePage, samplesPath, samplesQuery } from '@shared/api/samples';
import { slug } from '@shared/api/common';
import {
  componentList,
  equilibriumAnswer,
  equilibriumPath,
  flashRequest,
  inferenceAnswer,
  inferenceRequest,
  saturationRequest,
  vapourPressureAnswer,
  vapourPressureRequest,
} from '@shared/api/equilibrium';
import { health, healthPath } from '@shared/api/health';
import { journalPage, journalPath, journalQuery, newNote, note, notesPath } from '@shared/api/journal';
import type { Permission } from '@shared/api/permissions';
import {
  sensorDetail,
  sensorList,
  sensorsPath,
  towerList,
  towersPath,
  trend,
  trendQuery,
} from '@shared/api/sensors';
import { credentials, session, sessionPath } from '@shared/api/session';
import { streamEvent, streamPath } from '@shared/api/stream';
import * as z from 'zod';

export const openApiPath = '/api/openapi.json';

/** One route as the document tells of it. */
export interface Operation {
  readonly method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  /** Parameters in braces. */
  readonly path: string;
  readonly summary: string;
  readonly tag: string;
  readonly requirement: Permission | 'nothing';
  readonly params?: z.ZodObject;
  readonly query?: z.ZodObject;
  readonly body?: z.ZodType;
  /** Answers besides the problems every route may give; null has no body. */
  readonly answers: Readonly<Record<number, { readonly what: string; readonly schema: z.ZodType | null }>>;
  /** Problems of its own, by status. */
  readonly problems?: Readonly<Record<number, string>>;
  readonly mediaType?: string;
}

const sensorId = z.object({ id: slug });
const sampleId = z.object({ id: z.int() });
const ok = (what: string, schema: z.ZodType) => ({ 200: { what, schema } });
const noSensor = { 404: 'There is no sensor of that id.' };
const noPhysics = { 422: 'The question has no answer: one phase only, or no convergence.' };

const equilibrium = (name: string, summary: string, body: z.ZodType, answer: z.ZodType): Operation => ({
  method: 'post',
  path: `${equilibriumPath}/${name}`,
  summary,
  tag: 'Equilibrium',
  requirement: 'look',
  body,
  answers: ok('The answer, in the order of the components asked', answer),
  problems: noPhysics,
});

/** Every route there is; a test holds it against the routes of the running application. */
export const operations: readonly Operation[] = [
  {
    method: 'get',
    path: healthPath,
    summary: 'What works; without signing in',
    tag: 'Server',
    requirement: 'nothing',
    answers: {
      200: { what: 'It can be used', schema: health },
      503: { what: 'It cannot be used', schema: health },
    },
  },
  {
    method: 'get',
    path: openApiPath,
    summary: 'This document',
    tag: 'Server',
    requirement: 'nothing',
    answers: ok('OpenAPI 3.1', z.looseObject({ openapi: z.string() })),
  },
  {
    method: 'get',
    path: sessionPath,
    summary: 'Who is signed in, the site, and the server’s clock',
    tag: 'Session',
    requirement: 'nothing',
    answers: ok('`user` is null when nobody is signed in', session),
  },
  {
    method: 'post',
    path: sessionPath,
    summary: 'Sign in; the session’s cookie comes with the answer',
    tag: 'Session',
    requirement: 'nothing',
    body: credentials,
    answers: ok('Signed in', session),
    problems: {
      401: 'Name or password is wrong.',
      429: 'Locked after repeated failure; Retry-After says how long.',
    },
  },
  {
    method: 'delete',
    path: sessionPath,
    summary: 'Sign out; repeating it changes nothing',
    tag: 'Session',
    requirement: 'nothing',
    answers: { 204: { what: 'Signed out', schema: null } },
  },
  {
    method: 'get',
    path: streamPath,
    summary: 'What happens, as server-sent events; each event’s name is its `type`',
    tag: 'Live',
    requirement: 'look',
    answers: ok('Events without end', streamEvent),
    mediaType: 'text/event-stream',
    problems: { 503: 'Too many streams are open.' },
  },
  {
    method: 'get',
    path: journalPath,
    summary: 'The record, newest first',
    tag: 'Journal',
    requirement: 'look',
    query: journalQuery,
    answers: ok('One page', journalPage),
  },
  {
    method: 'get',
    path: notesPath,
    summary: 'Notes on one sensor’s trend, the most recent moment first',
    tag: 'Journal',
    requirement: 'look',
    query: z.object({ sensorId: slug }),
    answers: ok('At most 500 notes', z.array(note)),
    problems: noSensor,
  },
  {
    method: 'post',
    path: notesPath,
    summary: 'Write a note; each call writes one',
    tag: 'Journal',
    requirement: 'writeNotes',
    body: newNote,
    answers: { 201: { what: 'Written', schema: note } },
    problems: { ...noSensor, 422: 'The moment lies in the future.' },
  },
  {
    method: 'get',
    path: towersPath,
    summary: 'Every tower with its sensors’ ids',
    tag: 'Sensors',
    requirement: 'look',
    answers: ok('All towers', towerList),
  },
  {
    method: 'get',
    path: sensorsPath,
    summary: 'Every sensor with its latest minute',
    tag: 'Sensors',
    requirement: 'look',
    answers: ok('All sensors', sensorList),
  },
  {
    method: 'get',
    path: `${sensorsPath}/{id}`,
    summary: 'One sensor with its live version and the next move',
    tag: 'Sensors',
    requirement: 'look',
    params: sensorId,
    answers: ok('The sensor', sensorDetail),
    problems: noSensor,
  },
  {
    method: 'get',
    path: `${sensorsPath}/{id}/trend`,
    summary: 'A stretch of one sensor’s history, thinned to about `points`',
    tag: 'Sensors',
    requirement: 'look',
    params: sensorId,
    query: trendQuery,
    answers: ok('Columns, oldest first', trend),
    problems: noSensor,
  },
  {
    method: 'get',
    path: samplesPath,
    summary: 'Laboratory results, the last drawn first',
    tag: 'Samples',
    requirement: 'look',
    query: samplesQuery,
    answers: ok('One page', samplePage),
  },
  {
    method: 'get',
    path: `${samplesPath}/{id}`,
    summary: 'One laboratory result and what it changed',
    tag: 'Samples',
    requirement: 'look',
    params: sampleId,
    answers: ok('The result', sample),
    problems: { 404: 'There is no sample of that id.' },
  },
  {
    method: 'post',
    path: samplesPath,
    summary: 'Enter a laboratory result; the very same one again changes nothing',
    tag: 'Samples',
    requirement: 'enterSamples',
    body: newSample,
    answers: {
      200: { what: 'It was there already', schema: sampleOutcome },
      201: { what: 'Entered, and what it changed', schema: sampleOutcome },
    },
    problems: { 409: 'Another result is stored for that moment.', 422: 'The result cannot be right.' },
  },
  equilibrium('bubble-point', 'Bubble point of a liquid', saturationRequest, equilibriumAnswer),
  equilibrium('dew-point', 'Dew point of a vapour', saturationRequest, equilibriumAnswer),
  equilibrium('flash', 'Flash at a temperature and a pressure', flashRequest, equilibriumAnswer),
  equilibrium(
    'vapour-pressure',
    'Vapour pressure of one component',
    vapourPressureRequest,
    vapourPressureAnswer,
  ),
  equilibrium(
    'inference',
    'Composition from one temperature and one pressure',
    inferenceRequest,
    inferenceAnswer,
  ),
  {
    method: 'get',
    path: `${equilibriumPath}/components`,
    summary: 'Every component and its vapour pressure correlations, with sources',
    tag: 'Equilibrium',
    requirement: 'look',
    answers: ok('All components', componentList),
  },
];
