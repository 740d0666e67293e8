import { flushPromises } from '@vue/test-utils';
import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { effectScope, type EffectScope } from 'vue';
import { setThickness, setTitle } from '../../../app/commands';
import { fileName, useDesk, type Desk } from '../../../app/shell/useDesk';
import { useProjectStore } from '../../../app/stores';
import { writeProject } from '../../../solver/model';
import { fakeHost, type FakeHost } from '../support/fakeHost';
import { lining } from '../support/lining';

let host: FakeHost;
let desk: Desk;
let scope: EffectScope;

async function begin(prepared: FakeHost = fakeHost()): Promise<void> {
  host = prepared;
  scope = effectScope();
  desk = scope.run(() => useDesk(host)) as Desk;
  await flushPromises();
}

beforeEach(async () => {
  setActivePinia(createPinia());
  await begin();
});
afterEach(() => {
  scope.stop();
  vi.useRealTimers();
});

const edit = () => useProjectStore().commit(setTitle('Edited'));
const file = (name: string, text = writeProject(lining())) => ({ ref: { name, token: name }, text });

/** Starts something that may ask, and answers the question. */
async function answering(choice: 'save' | 'discard' | 'cancel', act: () => Promise<unknown>): Promise<void> {
  const done = act();
  await flushPromises();
  expect(desk.question.value).not.toBeNull();
  desk.question.value?.answer(choice);
  await done;
  await flushPromises();
}

describe('a plan with unsaved edits', () => {
  beforeEach(edit);

  it('is not left without asking', async () => {
    await answering('cancel', desk.newPlan);
    expect(useProjectStore().current.title).toBe('Edited');
    expect(desk.question.value).toBeNull();
  });

  it('is saved first when that is the answer', async () => {
    await answering('save', desk.newPlan);
    expect(host.saved).toHaveLength(1);
    expect(JSON.parse(host.saved[0].text).title).toBe('Edited');
    expect(useProjectStore().current.title).toBe('Untitled plan');
  });

  it('is not left when the save did not come about', async () => {
    host.next = { kind: 'cancelled' };
    await answering('save', desk.newPlan);
    expect(useProjectStore().current.title).toBe('Edited');
  });

  it('is given up when that is the answer', async () => {
    await answering('discard', () => desk.openSample(lining()));
    expect(host.saved).toEqual([]);
    expect(useProjectStore().current.title).toBe('Test lining');
  });

  it('keeps the window from closing until it was asked about', async () => {
    host.askToClose();
    await flushPromises();
    expect(host.closed.times).toBe(0);
    desk.question.value?.answer('discard');
    await flushPromises();
    expect(host.closed.times).toBe(1);
    expect(host.held).toBeNull();
  });

  it('is asked about before a file handed over takes its place', async () => {
    host.handOver(file('other.soak'));
    await flushPromises();
    expect(useProjectStore().current.title).toBe('Edited');
    desk.question.value?.answer('discard');
    await flushPromises();
    expect(useProjectStore().file?.name).toBe('other.soak');
  });
});

describe('a plan without edits', () => {
  it('is left without a question', async () => {
    await desk.openSample(lining());
    expect(useProjectStore().current.title).toBe('Test lining');
    host.askToClose();
    await flushPromises();
    expect(host.closed.times).toBe(1);
  });
});

describe('opening', () => {
  it('a good file shows it, ready to be saved back', async () => {
    host.toOpen = file('lining.soak');
    await desk.openFile();
    expect([desk.screen.value, useProjectStore().file?.name, useProjectStore().edited]).toEqual(['plan', 'lining.soak', false]);
  });

  it('a bad file names every place, and leaves the plan that is there', async () => {
    host.toOpen = file(
      'bad.soak',
      writeProject(lining()).replace('"thickness": 0.15', '"thickness": -0.15').replace('"soak"', '"heat"'),
    );
    await desk.openFile();
    expect(desk.notice.value?.title).toBe('bad.soak was not opened.');
    expect(desk.notice.value?.lines).toContain('part.layers[0].thickness must be more than 0 m, got -0.15');
    expect(desk.screen.value).toBe('start');
  });

  it('a file of a newer version says so', async () => {
    host.toOpen = file('new.soak', writeProject(lining()).replace('"version": 1', '"version": 9'));
    await desk.openFile();
    expect(desk.notice.value?.text).toContain('newer version');
  });

  it('what cannot be read says why', async () => {
    host.toOpen = new Error('The disk is gone.');
    await desk.openFile();
    expect(desk.notice.value?.text).toBe('The disk is gone.');
  });

  it('a dropped file is opened', async () => {
    await desk.openDropped(new File([writeProject(lining())], 'dropped.soak'));
    expect(useProjectStore().file?.name).toBe('dropped.soak');
  });
});

describe('saving', () => {
  beforeEach(async () => {
    host.toOpen = file('lining.soak');
    await desk.openFile();
    edit();
  });

  it('goes to the file it came from; save as asks', async () => {
    expect(await desk.save()).toBe(true);
    expect(await desk.saveAs()).toBe(true);
    expect(host.saved.map(({ name }) => name)).toEqual(['lining.soak', null]);
    expect(useProjectStore().edited).toBe(false);
  });

  it('never holds what is only tried', async () => {
    useProjectStore().tryDraft(setThickness(lining().part.layers[0], { value: 0.9, text: '' }));
    await desk.save();
    expect(JSON.parse(host.saved[0].text).part.layers[0].thickness).toBe(0.15);
  });

  it('over a file that changed on disk is asked about', async () => {
    host.next = { kind: 'changed-on-disk', ref: { name: 'lining.soak', token: 1 } };
    expect(await desk.save()).toBe(false);
    expect(useProjectStore().edited).toBe(true);
    host.next = null;
    desk.notice.value?.actions?.find(({ label }) => label === 'Replace it')?.act();
    await flushPromises();
    expect(host.saved.at(-1)?.options).toEqual({ overwriteChanged: true });
    expect([useProjectStore().edited, desk.notice.value]).toEqual([false, null]);
  });

  it('that failed says why, and the plan stays edited', async () => {
    host.next = { kind: 'failed', message: 'No room on the disk.' };
    expect(await desk.save()).toBe(false);
    expect([desk.notice.value?.text, useProjectStore().edited]).toEqual(['No room on the disk.', true]);
  });

  it('the window knows whether there are edits', async () => {
    await flushPromises();
    expect(host.title).toEqual({ title: 'Edited', edited: true });
    await desk.save();
    await flushPromises();
    expect(host.title).toEqual({ title: 'Edited', edited: false });
  });
});

describe('the journal', () => {
  it('holds the edits a little later, and nothing once they are saved', async () => {
    vi.useFakeTimers();
    edit();
    await vi.advanceTimersByTimeAsync(2000);
    expect(host.held?.title).toBe('Edited');
    expect(JSON.parse(host.held?.text ?? '{}').title).toBe('Edited');
    await desk.save();
    await vi.advanceTimersByTimeAsync(2000);
    expect(host.held).toBeNull();
  });

  it('of an earlier session is offered, and restored as unsaved work', async () => {
    scope.stop();
    await begin(fakeHost({ title: 'Lost', edited: '2026-01-01T10:00:00Z', text: writeProject(lining()), fileName: null }));
    expect(desk.recovery.value?.title).toBe('Lost');
    await desk.restore();
    expect([useProjectStore().current.title, useProjectStore().edited, desk.recovery.value]).toEqual(['Test lining', true, null]);
  });

  it('that is discarded is cleared', async () => {
    scope.stop();
    await begin(fakeHost({ title: 'Lost', edited: '2026-01-01T10:00:00Z', text: '', fileName: null }));
    await desk.discardRecovery();
    expect([host.held, desk.recovery.value]).toEqual([null, null]);
  });
});

it('a title becomes a file name that no file system minds', () => {
  expect(fileName('Ladle: 1/2 "dry"?')).toBe('Ladle 1 2 dry.soak');
  expect(fileName(' .. ')).toBe('Untitled plan.soak');
});
