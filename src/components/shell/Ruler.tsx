import { classes } from '@/components/ui/classes.ts';
import type { Station, Step } from './stations.ts';

interface Props {
  stations: readonly Station[];
  current: Step;
}

/** The project's path as a ruler: seven stations, ticks between them, the present one under a raised bar. */
export function Ruler({ stations, current }: Props) {
  return (
    <nav aria-label="Steps of the project" className="relative overflow-x-auto" data-ruler data-screen-only>
      <ol className="flex w-max min-w-full border-ink border-r">
        {stations.map((station) => (
          <li
            key={station.step}
            className="relative min-w-32 flex-1 border-ink border-l"
            data-current={station.step === current || undefined}
          >
            <Ticks />
            {station.step === current && <span className="absolute inset-x-0 top-0 h-[5px] bg-act" />}
            <StationBody station={station} current={station.step === current} />
          </li>
        ))}
      </ol>
    </nav>
  );
}

function StationBody({ station, current }: { station: Station; current: boolean }) {
  const text = (
    <>
      <span className={classes('block font-semibold', current && 'text-act')}>{station.label}</span>
      <span className="block whitespace-nowrap text-quiet text-tiny">{station.state}</span>
    </>
  );
  const box = 'block h-full px-2.5 pt-4 pb-2';
  if (!station.href) return <div className={classes(box, 'text-quiet')}>{text}</div>;
  return (
    <a
      href={station.href}
      aria-current={current ? 'page' : undefined}
      className={classes(box, 'no-underline -outline-offset-2 hover:[&>:first-child]:text-act')}
    >
      {text}
    </a>
  );
}

const TENTHS = [1, 2, 3, 4, 5, 6, 7, 8, 9].map((i) => `${i * 10}%`);

function Ticks() {
  return (
    <svg className="absolute inset-x-0 top-0 h-1.5 w-full text-ink" aria-hidden="true" focusable="false">
      <g stroke="currentColor" shapeRendering="crispEdges">
        <line x1="0" x2="100%" y1="0.5" y2="0.5" />
        {TENTHS.map((x) => (
          <line key={x} x1={x} x2={x} y1="0" y2="6" />
        ))}
      </g>
    </svg>
  );
}
