import { endpoints } from '@/api/endpoints.ts';
import type { Fleet } from '@/api/fleet.ts';
import type { Place } from '@/api/runs.ts';
import { useApi } from '@/client/hooks.ts';
import { SelectField } from '@/components/ui/fields.tsx';
import { counted } from '@/components/ui/numbers.ts';
import { paths } from '@/paths.ts';

interface Props {
  label: string;
  value: Place;
  error?: string | undefined;
  disabled?: boolean;
  onChange: (place: Place) => void;
}

/** Where shards are computed; the fleet is offered where there is one. */
export function PlaceField({ label, value, error, disabled, onChange }: Props) {
  const { data: fleet } = useApi(endpoints.getFleet, {});
  return (
    <SelectField
      label={label}
      value={value}
      error={error}
      disabled={disabled}
      hint={
        <>
          {PLACE_HINT[value]};{' '}
          <a className="link" href={paths.fleet}>
            places
          </a>
        </>
      }
      choices={[
        { value: 'browser', label: 'in this browser' },
        {
          value: 'server',
          label: fleet ? `on the server, ${counted(fleet.serverThreads, 'thread')}` : 'on the server',
        },
        { value: 'fleet', label: fleetLabel(fleet), disabled: fleet?.redis === 'off' && value !== 'fleet' },
      ]}
      onChange={(event) => onChange(event.target.value as Place)}
    />
  );
}

const PLACE_HINT: Record<Place, string> = {
  browser: 'stands still while no tab has it open',
  server: 'goes on by itself',
  fleet: 'goes on by itself, on every machine that has joined',
};

function fleetLabel(fleet: Fleet | undefined): string {
  if (!fleet) return 'on the fleet';
  if (fleet.redis === 'off') return 'on a fleet (the server has no REDIS_URL)';
  return `on the fleet, ${fleet.redis === 'down' ? 'Redis is down' : counted(fleet.machines.length, 'machine')}`;
}
