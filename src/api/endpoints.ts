import { z } from 'zod';
import { accountPatchSchema, accountSchema, newPasswordSchema, passwordChangeSchema } from './account.ts';
import { analysisSchema, newAnalysisSchema } from './analyses.ts';
import {
  candidateAnswerSchema,
  candidateQueryParams,
  catalogueAnswerSchema,
  catalogueMapSchema,
  catalogueQueryParams,
  feasibilityAnswerSchema,
  feasibilityQuerySchema,
} from './catalogue.ts';
import { codeSchema, jobSchema, matrixFormatSchema, newCodeSchema } from './codes.ts';
import { endpoint } from './endpoint.ts';
import { fleetSchema } from './fleet.ts';
import { measurementSchema, newMeasurementSchema } from './measurements.ts';
import {
  deadLetterSchema,
  noticeChoicesPatchSchema,
  noticeChoicesSchema,
  noticePatchSchema,
  noticeSchema,
  unreadSchema,
} from './notices.ts';
import { newProjectSchema, projectSchema, requirementsSchema } from './projects.ts';
import {
  blockFormSchema,
  codeFormsSchema,
  generatorFormSchema,
  newEndingSchema,
  newReleaseSchema,
  rebuildSchema,
  releaseSchema,
  releaseSheetSchema,
  vectorQueryParams,
  wordFormSchema,
} from './releases.ts';
import {
  failedShardsSchema,
  leasesSchema,
  newLeasesSchema,
  newRunSchema,
  pointSchema,
  pointsQueryParams,
  provenanceQueryParams,
  provenanceSchema,
  runEventsQueryParams,
  runPatchSchema,
  runSchema,
  shardBatchSchema,
  shardReceiptSchema,
  waitQueryParams,
} from './runs.ts';
import {
  newCommentSchema,
  newDecisionSchema,
  newSignOffSchema,
  signOffCommentSchema,
  signOffSchema,
  signOffSheetSchema,
} from './sign-offs.ts';
import { newTokenSchema, tokenSchema } from './tokens.ts';
import { uploadQueryParams } from './uploads.ts';

const page = { after: z.string().optional(), limit: z.coerce.number().int().min(1).max(500).optional() };
const storedRequirements = z.object({ requirements: requirementsSchema.nullable(), updatedAt: z.string().nullable() });

/** The whole HTTP interface under /api/v1. */
export const endpoints = {
  listProjects: endpoint('GET', '/projects', 'Projects the caller belongs to', {
    query: z.object(page),
    response: z.object({ projects: z.array(projectSchema), next: z.string().optional() }),
  }),
  createProject: endpoint('POST', '/projects', 'Start a project; the caller owns it', {
    body: newProjectSchema,
    response: z.object({ project: projectSchema }),
    success: [201],
    scopes: ['run'],
  }),
  getProject: endpoint('GET', '/projects/:id', 'One project', { response: z.object({ project: projectSchema }) }),
  getRequirements: endpoint('GET', '/projects/:id/requirements', 'What the project needs', {
    response: storedRequirements,
  }),
  putRequirements: endpoint('PUT', '/projects/:id/requirements', 'State what the project needs', {
    body: requirementsSchema,
    response: storedRequirements,
  }),
  searchCatalogue: endpoint('GET', '/catalogue', 'Constructions that could meet requirements, from closed formulas', {
    query: catalogueQueryParams,
    response: catalogueAnswerSchema,
  }),
  mapCatalogue: endpoint('GET', '/catalogue/map', 'Where everything that matches lies, by length and rate', {
    query: catalogueQueryParams,
    response: catalogueMapSchema,
  }),
  findCandidate: endpoint('GET', '/catalogue/candidate', 'One candidate by its id, with its verdicts', {
    query: candidateQueryParams,
    response: candidateAnswerSchema,
  }),
  feasibility: endpoint('POST', '/feasibility', 'Whether a design exists, with the theorem that says so', {
    body: feasibilityQuerySchema,
    response: feasibilityAnswerSchema,
    scopes: ['read'],
  }),
  listCodes: endpoint('GET', '/projects/:id/codes', 'Codes kept in the project', {
    query: z.object(page),
    response: z.object({ codes: z.array(codeSchema), next: z.string().optional() }),
  }),
  createCode: endpoint(
    'POST',
    '/projects/:id/codes',
    'Build a design or take steps from an upload, and keep the code',
    {
      body: newCodeSchema,
      response: z.union([z.object({ code: codeSchema }), z.object({ job: jobSchema })]),
      success: [201, 202],
      scopes: ['run'],
    },
  ),
  uploadCode: endpoint('POST', '/projects/:id/uploads', 'Keep the code that a matrix or block-list file holds', {
    takes: 'file',
    query: uploadQueryParams,
    response: z.object({ code: codeSchema }),
    success: [201],
  }),
  listMeasurements: endpoint('GET', '/projects/:id/measurements', 'Error rates measured elsewhere', {
    response: z.object({ measurements: z.array(measurementSchema) }),
  }),
  createMeasurement: endpoint('POST', '/projects/:id/measurements', 'Keep error rates measured elsewhere', {
    body: newMeasurementSchema,
    response: z.object({ measurement: measurementSchema }),
    success: [201],
  }),
  deleteMeasurement: endpoint('DELETE', '/measurements/:id', 'Remove measured data', { success: [204] }),
  getJob: endpoint('GET', '/jobs/:id', 'How a long piece of work stands', { response: z.object({ job: jobSchema }) }),
  getCode: endpoint('GET', '/codes/:id', 'One code with its properties', { response: z.object({ code: codeSchema }) }),
  deleteCode: endpoint('DELETE', '/codes/:id', 'Remove a code that no run uses', { success: [204] }),
  listAnalyses: endpoint('GET', '/codes/:id/analyses', 'What more was asked of a code, newest first', {
    response: z.object({ analyses: z.array(analysisSchema) }),
  }),
  startAnalysis: endpoint('POST', '/codes/:id/analyses', 'Ask more of a code and keep what it tells', {
    body: newAnalysisSchema,
    response: z.object({ analysis: analysisSchema }),
    success: [201, 202],
    scopes: ['run'],
  }),
  getAnalysis: endpoint('GET', '/analyses/:id', 'How an analysis stands, and what it told', {
    response: z.object({ analysis: analysisSchema }),
  }),
  cancelAnalysis: endpoint('DELETE', '/analyses/:id', 'End an analysis that still works', {
    success: [204],
    scopes: ['run'],
  }),
  getAnalysisList: endpoint('GET', '/analyses/:id/list', 'The sets or words that an analysis found, as a file', {}),
  getMatrix: endpoint('GET', '/codes/:id/matrix', 'The parity-check matrix as a file', {
    query: z.object({ format: matrixFormatSchema }),
  }),
  getManifest: endpoint(
    'GET',
    '/codes/:id/manifest',
    'Parameters, construction, fingerprint and digests of the files',
    {
      response: z.looseObject({ fingerprint: z.string() }),
    },
  ),
  getForms: endpoint('GET', '/codes/:id/forms', 'The files that the code can be given as', {
    response: codeFormsSchema,
  }),
  getBlocks: endpoint('GET', '/codes/:id/blocks', 'The block list of the design as a file', {
    query: z.strictObject({ form: blockFormSchema }),
  }),
  getGenerator: endpoint(
    'GET',
    '/codes/:id/generator',
    'The generator as polynomial, circulants or systematic matrix',
    {
      query: z.strictObject({ form: generatorFormSchema }),
    },
  ),
  getWords: endpoint('GET', '/codes/:id/words', 'The words of a constant-weight code as a file', {
    query: z.strictObject({ form: wordFormSchema }),
  }),
  getVectors: endpoint('GET', '/codes/:id/vectors', 'Test vectors for decoders, from a seed', {
    query: vectorQueryParams,
  }),
  listRuns: endpoint('GET', '/projects/:id/runs', 'Runs of the project, newest first', {
    query: z.object(page),
    response: z.object({ runs: z.array(runSchema), next: z.string().optional() }),
  }),
  createRun: endpoint('POST', '/projects/:id/runs', 'State a run', {
    body: newRunSchema,
    response: z.object({ run: runSchema.extend({ points: z.array(pointSchema) }) }),
    success: [201],
    scopes: ['run'],
  }),
  getRun: endpoint('GET', '/runs/:id', 'A run with the tallies of its points, of over 2,000 those that a chart needs', {
    response: z.object({ run: runSchema, points: z.array(pointSchema), omitted: z.number() }),
    scopes: ['read', 'run'],
  }),
  runPoints: endpoint('GET', '/runs/:id/points', 'Points of a run in their order, as JSON or CSV', {
    query: pointsQueryParams,
    response: z.object({ points: z.array(pointSchema), next: z.string().optional() }),
    scopes: ['read', 'run'],
  }),
  runEnd: endpoint('GET', '/runs/:id/end', 'Answers once the run has ended, or when the seconds are over', {
    query: waitQueryParams,
    response: z.object({ run: runSchema, ended: z.boolean() }),
    scopes: ['read', 'run'],
  }),
  runEvents: endpoint('GET', '/runs/:id/events', 'Server-sent `run` events: the run, and its points as they change', {
    query: runEventsQueryParams,
    scopes: ['read', 'run'],
  }),
  patchRun: endpoint('PATCH', '/runs/:id', 'Pause, resume, stop or rename a run', {
    body: runPatchSchema,
    response: z.object({ run: runSchema }),
    scopes: ['run'],
  }),
  postShards: endpoint('POST', '/runs/:id/shards', 'Hand in computed shards; answered once they are committed', {
    body: shardBatchSchema,
    response: shardReceiptSchema,
    scopes: ['run'],
  }),
  leaseShards: endpoint('POST', '/runs/:id/leases', 'Take shards to compute that nobody else has', {
    body: newLeasesSchema,
    response: leasesSchema,
    scopes: ['run'],
  }),
  failShards: endpoint(
    'POST',
    '/runs/:id/failures',
    'Say that shards could not be computed; the third time sets one aside',
    {
      body: failedShardsSchema,
      response: z.object({ setAside: z.number() }),
      scopes: ['run'],
    },
  ),
  runProvenance: endpoint('GET', '/runs/:id/provenance', 'Where shards were computed, and which contradict or failed', {
    query: provenanceQueryParams,
    response: provenanceSchema,
  }),
  getFleet: endpoint('GET', '/fleet', 'Where shards can be computed besides browsers, and who has joined', {
    response: fleetSchema,
  }),
  projectPoints: endpoint(
    'GET',
    '/projects/:id/points',
    'Measured points of the project, of over 2,000 those that a chart needs',
    {
      query: z.object({ codeId: z.string().optional(), runId: z.string().optional() }),
      response: z.object({ points: z.array(pointSchema), omitted: z.number() }),
    },
  ),
  listReleases: endpoint('GET', '/projects/:id/releases', 'Releases of the project, newest first', {
    query: z.object(page),
    response: z.object({ releases: z.array(releaseSchema), next: z.string().optional() }),
    scopes: ['read', 'release:read'],
  }),
  createRelease: endpoint('POST', '/projects/:id/releases', 'Make and freeze a numbered bundle of a code', {
    body: newReleaseSchema,
    response: z.object({ release: releaseSchema }),
    success: [201],
  }),
  getRelease: endpoint('GET', '/releases/:id', 'A release, its files and its manifest', {
    response: releaseSheetSchema,
    scopes: ['read', 'release:read'],
  }),
  endRelease: endpoint('POST', '/releases/:id/endings', 'Supersede or withdraw a release, with a reason', {
    body: newEndingSchema,
    response: z.object({ release: releaseSchema }),
    success: [201],
  }),
  rebuildRelease: endpoint('POST', '/releases/:id/rebuild', 'Make the bundle again and compare its digest', {
    response: rebuildSchema,
    scopes: ['read', 'release:read'],
  }),
  getReleaseFile: endpoint('GET', '/releases/:id/files/:name', 'A file of a release, or its whole bundle, in ranges', {
    scopes: ['read', 'release:read'],
  }),
  getAccount: endpoint('GET', '/account', 'The account of whoever asks', {
    response: z.object({ account: accountSchema }),
  }),
  patchAccount: endpoint('PATCH', '/account', 'Change the own name', {
    body: accountPatchSchema,
    response: z.object({ account: accountSchema }),
  }),
  putPassword: endpoint('PUT', '/account/password', 'Change the own password; other sessions end', {
    body: newPasswordSchema,
    response: passwordChangeSchema,
  }),
  listTokens: endpoint('GET', '/account/tokens', 'The own API tokens, newest first', {
    response: z.object({ tokens: z.array(tokenSchema) }),
    scopes: [],
  }),
  createToken: endpoint('POST', '/account/tokens', 'Make an API token; its secret is in this answer only', {
    body: newTokenSchema,
    response: z.object({ token: tokenSchema, secret: z.string() }),
    success: [201],
  }),
  revokeToken: endpoint('DELETE', '/account/tokens/:id', 'End one of the own API tokens at once', { success: [204] }),
  listNotices: endpoint('GET', '/notices', 'What the caller was told, newest first', {
    query: z.object(page),
    response: unreadSchema.extend({ notices: z.array(noticeSchema), next: z.string().optional() }),
  }),
  patchNotice: endpoint('PATCH', '/notices/:id', 'Mark a notice as read or unread', {
    body: noticePatchSchema,
    response: unreadSchema,
  }),
  readAllNotices: endpoint('POST', '/notices/read', 'Mark every notice as read', {
    body: z.strictObject({}),
    response: unreadSchema,
  }),
  noticeEvents: endpoint('GET', '/notices/events', 'Server-sent `unread` events: how many notices are unread', {}),
  getNoticeChoices: endpoint('GET', '/account/notices', 'Which notices the caller gets by e-mail', {
    response: noticeChoicesSchema,
  }),
  putNoticeChoices: endpoint('PUT', '/account/notices', 'Choose which notices come by e-mail', {
    body: noticeChoicesPatchSchema,
    response: noticeChoicesSchema,
  }),
  listDeadLetters: endpoint('GET', '/mail/dead', 'Mail that could not be delivered; for administrators', {
    query: z.object(page),
    response: z.object({ letters: z.array(deadLetterSchema), next: z.string().optional() }),
    scopes: [],
  }),
  retryDeadLetter: endpoint('POST', '/mail/dead/:id/retry', 'Try undeliverable mail anew', {
    body: z.strictObject({}),
    success: [204],
  }),
  discardDeadLetter: endpoint('DELETE', '/mail/dead/:id', 'Drop undeliverable mail', { success: [204] }),
  listSignOffs: endpoint('GET', '/projects/:id/sign-offs', 'Sign-offs asked for in the project, newest first', {
    query: z.object(page),
    response: z.object({ signOffs: z.array(signOffSchema), next: z.string().optional() }),
  }),
  askSignOff: endpoint('POST', '/projects/:id/sign-offs', 'Ask for a sign-off on a code, as it stands now', {
    body: newSignOffSchema,
    response: z.object({ signOff: signOffSchema }),
    success: [201],
  }),
  getSignOff: endpoint('GET', '/sign-offs/:id', 'A sign-off with its snapshot, checks and comments', {
    response: signOffSheetSchema,
  }),
  commentSignOff: endpoint(
    'POST',
    '/sign-offs/:id/comments',
    'Comment on a sign-off, or on a property or point of it, for good',
    {
      body: newCommentSchema,
      response: z.object({ comment: signOffCommentSchema }),
      success: [201],
    },
  ),
  decideSignOff: endpoint('POST', '/sign-offs/:id/decision', 'Approve or return, with a reason', {
    body: newDecisionSchema,
    response: z.object({ signOff: signOffSchema }),
    success: [201],
  }),
} as const;
