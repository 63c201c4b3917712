import type { Project } from '@/api/projects.ts';
import { stationsOf } from '@/components/shell/stations.ts';
import { EmptyState } from '@/components/ui/EmptyState.tsx';
import { paths } from '@/paths.ts';

/** Every project the reader belongs to, with the state of its steps. */
export function ProjectList({ projects }: { projects: readonly Project[] }) {
  if (projects.length === 0) {
    return (
      <EmptyState title="No project yet">
        Start one, or ask the owner of a project to add you to it. A project holds requirements, codes and their
        measured error rates.
      </EmptyState>
    );
  }
  return (
    <ul className="border-ink border-t">
      {projects.map((project) => (
        <li key={project.id} className="grid gap-x-8 gap-y-2 border-rule border-b py-4 md:grid-cols-[1fr_auto]">
          <div className="min-w-0">
            <h2>
              <a href={paths.project(project.id)} className="link">
                {project.name}
              </a>
            </h2>
            {project.description && <p className="mt-0.5 max-w-prose">{project.description}</p>}
            <p className="mt-1 text-quiet text-tiny">
              {project.isDemo && 'demonstration, invented scenario · '}you are {article(project.role)} {project.role}
            </p>
          </div>
          <dl className="grid grid-cols-2 gap-x-6 gap-y-1 text-tiny sm:grid-cols-4 md:text-right">
            {stationsOf(project)
              .filter((station) => station.href)
              .map((station) => (
                <div key={station.step}>
                  <dt className="text-quiet">{station.label}</dt>
                  <dd className="font-semibold">{station.state}</dd>
                </div>
              ))}
          </dl>
        </li>
      ))}
    </ul>
  );
}

const article = (role: Project['role']) => (/^[aeo]/.test(role) ? 'an' : 'a');
