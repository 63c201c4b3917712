import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { RunDriverHandle } from '@/client/use-run-driver.ts';
import { RunPanel } from '@/components/runs/RunPanel.tsx';
import { percentText, progressText, rateText } from '@/components/runs/run-progress.ts';
import { useDocumentTitle } from '@/components/runs/use-document-title.ts';
import { WatchPanel } from '@/components/runs/WatchPanel.tsx';
import { examplePoint } from '../example-points.ts';
import { exampleRun } from '../example-runs.ts';

afterEach(cleanup);

function Titled({ prefix }: { prefix: string | null }) {
  useDocumentTitle(prefix);
  return null;
}

const points = [
  examplePoint({ id: 'a', done: true }),
  examplePoint({ id: 'b', p: 0.01, frames: 2000, frameErrors: 3 }),
];

function panel(driver: Partial<RunDriverHandle>, run = exampleRun({ state: 'running' })) {
  const handle: RunDriverHandle = {
    status: 'running',
    workers: 3,
    framesPerSecond: 8.1e6,
    timeLeftMs: 100_000,
    fractionDone: 0.625,
    message: null,
    pointTallies: new Map(),
    start: vi.fn(),
    pause: vi.fn(),
    resume: vi.fn(),
    stop: vi.fn(),
    ...driver,
  };
  render(<RunPanel run={run} points={points} driver={handle} />);
  return handle;
}

describe('the panel of a run', () => {
  it('shows share, time left, speed and errors so far', () => {
    panel({});
    expect(screen.getByRole('progressbar').getAttribute('aria-valuenow')).toBe('63');
    const text = document.body.textContent;
    expect(text).toContain('62\u202f%, 1 min 40 s left');
    expect(text).toContain('8.1 M frames/s');
    expect(text).toContain('503 frame errors in 12\u202f000 frames, 1 of 2 points done');
  });

  it('pauses while it runs and resumes when paused', () => {
    const running = panel({});
    fireEvent.click(screen.getByRole('button', { name: 'Pause' }));
    expect(running.pause).toHaveBeenCalledOnce();
    cleanup();
    const paused = panel({ status: 'paused' }, exampleRun({ state: 'paused' }));
    fireEvent.click(screen.getByRole('button', { name: 'Resume' }));
    expect(paused.resume).toHaveBeenCalledOnce();
  });

  it('starts a run that is ready, and goes on with one that was left', () => {
    const ready = panel({ status: 'idle' }, exampleRun({ state: 'ready' }));
    fireEvent.click(screen.getByRole('button', { name: 'Start' }));
    expect(ready.start).toHaveBeenCalledOnce();
    cleanup();
    panel({ status: 'idle' });
    expect(screen.getByRole('button', { name: 'Go on here' })).toBeTruthy();
    expect(document.body.textContent).toContain('Not running here');
  });

  it('asks before it stops, since stopping is final', () => {
    const handle = panel({});
    fireEvent.click(screen.getByRole('button', { name: 'Stop' }));
    expect(handle.stop).not.toHaveBeenCalled();
    fireEvent.click(screen.getByText('Stop the run'));
    expect(handle.stop).toHaveBeenCalledOnce();
  });

  it('says that it waits for the server, and that it will go on by itself', () => {
    panel({ status: 'waiting-for-server', message: 'The disk is full.' });
    expect(document.body.textContent).toContain('Waiting for the server');
    expect(document.body.textContent).toContain('The disk is full.');
    expect(document.body.textContent).toContain('goes on by itself');
  });

  it('has no controls left when the run is over', () => {
    panel({ status: 'finished' }, exampleRun({ state: 'finished' }));
    expect(screen.queryAllByRole('button', { hidden: false })).toHaveLength(0);
  });
});

describe('the panel for those who read', () => {
  it('shows the same figures and nothing to press', () => {
    render(<WatchPanel run={exampleRun({ state: 'running' })} points={points} />);
    expect(document.body.textContent).toContain('503 frame errors');
    expect(screen.queryAllByRole('button')).toHaveLength(0);
  });
});

describe('progress in words', () => {
  it('says 100 % only at the end', () => {
    expect(percentText(0.9999)).toBe('99\u202f%');
    expect(percentText(1)).toBe('100\u202f%');
    expect(progressText(0.5, null)).toBe('50\u202f%');
  });

  it('counts frames a second from one to millions', () => {
    expect(rateText(0)).toBe('');
    expect(rateText(3.14)).toBe('3.1 frames/s');
    expect(rateText(940)).toBe('940 frames/s');
    expect(rateText(42_000)).toBe('42 k frames/s');
  });

  it('stands before the title of the page and leaves it as it was', () => {
    document.title = 'Run 7 · Shore archive';
    const { rerender, unmount } = render(<Titled prefix="62 %" />);
    expect(document.title).toBe('62 % · Run 7 · Shore archive');
    rerender(<Titled prefix={null} />);
    expect(document.title).toBe('Run 7 · Shore archive');
    rerender(<Titled prefix="63 %" />);
    unmount();
    expect(document.title).toBe('Run 7 · Shore archive');
  });
});
