/** Every address a person or a script can follow, in one place. */
export const paths = {
  home: '/',
  signIn: '/sign-in',
  project: (id: string) => `/projects/${id}`,
  requirements: (id: string) => `/projects/${id}/requirements`,
  candidates: (id: string) => `/projects/${id}/candidates`,
  codes: (id: string) => `/projects/${id}/codes`,
  newCode: (id: string) => `/projects/${id}/codes/new`,
  uploadCode: (id: string) => `/projects/${id}/codes/upload`,
  code: (projectId: string, id: string) => `/projects/${projectId}/codes/${id}`,
  runs: (id: string) => `/projects/${id}/runs`,
  newRun: (id: string) => `/projects/${id}/runs/new`,
  run: (projectId: string, id: string) => `/projects/${projectId}/runs/${id}`,
  compare: (id: string) => `/projects/${id}/compare`,
  releases: (id: string) => `/projects/${id}/releases`,
  newRelease: (id: string) => `/projects/${id}/releases/new`,
  release: (projectId: string, id: string) => `/projects/${projectId}/releases/${id}`,
} as const;
