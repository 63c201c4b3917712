import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { createProject } from '@/server/use-cases/projects/create-project.ts';
import { listProjects } from '@/server/use-cases/projects/list-projects.ts';

export const GET = handle(endpoints.listProjects, (call) => listProjects(call, call.query));

export const POST = handle(endpoints.createProject, async (call) => ({
  project: await createProject(call, call.body),
}));

export const ALL = methodNotAllowed('GET', 'POST');
