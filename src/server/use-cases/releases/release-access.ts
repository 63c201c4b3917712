import type { Project, ProjectRole } from '@/api/projects.ts';
import type { Release } from '@/api/releases.ts';
import type { Context } from '../../context.ts';
import { isId } from '../../ids.ts';
import { notFound, Refusal } from '../../refusal.ts';
import { releaseById } from '../../repositories/releases.ts';
import { projectToRead } from '../rights.ts';

/** Who may say that a release no longer holds: those who make releases, and those who decide on them. */
const mayEnd: Record<ProjectRole, boolean> = { owner: true, engineer: true, reviewer: true, viewer: false };

/** A release of a project that the caller belongs to. */
export async function releaseToRead(
  context: Context,
  releaseId: string,
): Promise<{ release: Release; project: Project }> {
  const release = isId(releaseId) ? await releaseById(context.db, releaseId) : undefined;
  if (!release) throw notFound('release');
  return { release, project: await projectToRead(context, release.projectId, 'release') };
}

/** A release that the caller may supersede or withdraw. */
export async function releaseToEnd(context: Context, releaseId: string): Promise<Release> {
  const { release, project } = await releaseToRead(context, releaseId);
  if (!mayEnd[project.role]) {
    throw new Refusal('forbidden', `A ${project.role} may not end a release; an owner, engineer or reviewer may.`);
  }
  return release;
}
