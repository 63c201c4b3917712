import type { ReactNode } from 'react';

interface Props {
  title: string;
  children?: ReactNode;
  action?: ReactNode;
}

/** Nothing here yet, why, and the one thing to do about it. */
export function EmptyState({ title, children, action }: Props) {
  return (
    <div className="border border-rule border-dashed px-5 py-8">
      <h2>{title}</h2>
      {children && <p className="mt-1 max-w-prose text-quiet">{children}</p>}
      {action && <div className="mt-4">{action}</div>}
    </div>
  );
}
