import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { createBrowserHost } from '../../../app/bridge/browser';

/** A worker that only carries messages. */
class FakeWorker extends EventTarget {
  posted: { message: unknown; transfer: unknown }[] = [];
  ended = false;
  postMessage(message: unknown, transfer: unknown): void {
    this.posted.push({ message, transfer });
  }
  terminate(): void {
    this.ended = true;
  }
  says(data: unknown): void {
    this.dispatchEvent(Object.assign(new Event('message'), { data }));
  }
}

/** A file in memory behind a handle, as a picker gives it. */
function fakeHandle(name: string, text: string) {
  const state = { text, lastModified: 1000, refuse: null as DOMException | null };
  const handle = {
    name,
    getFile: async () => new File([state.text], name, { lastModified: state.lastModified }),
    createWritable: async () => {
      if (state.refuse !== null) throw state.refuse;
      let written = '';
      return {
        write: async (part: string) => void (written += part),
        close: async () => {
          state.text = written;
          state.lastModified += 1000;
        },
      };
    },
  };
  return { state, handle: handle as unknown as FileSystemFileHandle };
}

/** Locks that are there at once, as for the only tab. */
const locks = { request: () => new Promise(() => undefined), query: async () => ({ held: [], pending: [] }) };

function setUp(pickers: { open?: () => Promise<FileSystemFileHandle[]>; save?: () => Promise<FileSystemFileHandle> } = {}) {
  const worker = new FakeWorker();
  Object.assign(window, { showOpenFilePicker: pickers.open, showSaveFilePicker: pickers.save });
  vi.stubGlobal('navigator', { locks });
  Object.defineProperty(window, 'navigator', { value: { locks }, configurable: true });
  return { host: createBrowserHost(window, () => worker as unknown as Worker), worker };
}

beforeEach(() => {
  localStorage.clear();
  sessionStorage.clear();
});
afterEach(() => {
  vi.unstubAllGlobals();
  vi.restoreAllMocks();
});

describe('the solver of the browser host', () => {
  it('is a worker whose messages are the port, buffers handed over', async () => {
    const { host, worker } = setUp();
    const { port, kill } = await host.startSolver();
    const heard: unknown[] = [];
    const stop = port.listen((message) => heard.push(message));
    worker.says({ type: 'ready' });
    stop();
    worker.says({ type: 'late' });
    expect(heard).toEqual([{ type: 'ready' }]);
    const buffer = new ArrayBuffer(8);
    port.post({ ask: 1 }, [buffer]);
    port.post({ ask: 2 });
    expect(worker.posted).toEqual([
      { message: { ask: 1 }, transfer: [buffer] },
      { message: { ask: 2 }, transfer: [] },
    ]);
    kill();
    expect(worker.ended).toBe(true);
  });

  it('that fails is missed once, with its reason', async () => {
    const { host, worker } = setUp();
    const { onExit } = await host.startSolver();
    const reasons: string[] = [];
    onExit((reason) => reasons.push(reason));
    worker.dispatchEvent(Object.assign(new Event('error'), { message: 'out of memory' }));
    worker.dispatchEvent(new Event('error'));
    expect(reasons).toEqual(['out of memory']);
  });
});

describe('files by handle', () => {
  it('are saved to the same place without another question', async () => {
    const { state, handle } = fakeHandle('a.soak', 'old');
    const { host } = setUp({ open: async () => [handle] });
    const opened = await host.openFile();
    expect(opened?.text).toBe('old');
    const first = await host.saveFile('new', opened?.ref ?? null, 'a.soak');
    expect(first.kind).toBe('saved');
    expect(state.text).toBe('new');
    const second = await host.saveFile('newer', first.kind === 'saved' ? first.ref : null, 'a.soak');
    expect([second.kind, state.text]).toEqual(['saved', 'newer']);
  });

  it('are not written over what another program wrote, unless told to', async () => {
    const { state, handle } = fakeHandle('a.soak', 'old');
    const { host } = setUp({ open: async () => [handle] });
    const ref = (await host.openFile())?.ref ?? null;
    state.text = 'theirs';
    state.lastModified = 5000;
    expect((await host.saveFile('mine', ref, 'a.soak')).kind).toBe('changed-on-disk');
    expect(state.text).toBe('theirs');
    expect((await host.saveFile('mine', ref, 'a.soak', { overwriteChanged: true })).kind).toBe('saved');
    expect(state.text).toBe('mine');
  });

  it('say in plain words why they cannot be written', async () => {
    const { state, handle } = fakeHandle('a.soak', 'old');
    const { host } = setUp({ open: async () => [handle] });
    const ref = (await host.openFile())?.ref ?? null;
    state.refuse = new DOMException('no', 'NotAllowedError');
    expect(await host.saveFile('new', ref, 'a.soak')).toEqual({
      kind: 'failed',
      message: 'a.soak could not be saved: the browser was not allowed to write it. Save again and allow it.',
    });
  });

  it('closing a picker is no error', async () => {
    const abort = () => Promise.reject(new DOMException('closed', 'AbortError'));
    const { host } = setUp({ open: abort, save: abort });
    expect(await host.openFile()).toBeNull();
    expect(await host.saveFile('text', null, 'a.soak')).toEqual({ kind: 'cancelled' });
  });

  it('saved for the first time go where the person says', async () => {
    const { state, handle } = fakeHandle('b.soak', 'whatever was there');
    const { host } = setUp({ save: async () => handle });
    const saved = await host.saveFile('text', null, 'a.soak');
    expect(saved).toMatchObject({ kind: 'saved', ref: { name: 'b.soak' } });
    expect(state.text).toBe('text');
  });
});

describe('files without handles', () => {
  it('are downloaded under their name, again and again', async () => {
    const { host } = setUp();
    const downloads: string[] = [];
    vi.spyOn(HTMLAnchorElement.prototype, 'click').mockImplementation(function (this: HTMLAnchorElement) {
      downloads.push(this.download);
    });
    const saved = await host.saveFile('text', null, 'plan.soak');
    expect(saved).toMatchObject({ kind: 'saved', ref: { name: 'plan.soak' } });
    await host.saveFile('more', saved.kind === 'saved' ? saved.ref : null, 'other.soak');
    expect(downloads).toEqual(['plan.soak', 'plan.soak']);
  });

  it('are uploaded through a file field, and a drop is read alike', async () => {
    const { host } = setUp();
    const file = new File(['{"a":1}'], 'up.soak');
    vi.spyOn(HTMLInputElement.prototype, 'click').mockImplementation(function (this: HTMLInputElement) {
      Object.defineProperty(this, 'files', { value: [file] });
      this.dispatchEvent(new Event('change'));
    });
    expect(await host.openFile()).toMatchObject({ text: '{"a":1}', ref: { name: 'up.soak' } });
    expect(await host.openDropped(file)).toMatchObject({ text: '{"a":1}', ref: { name: 'up.soak' } });
  });
});

describe('leaving the page', () => {
  it('is questioned only while there are unsaved edits', () => {
    const { host } = setUp();
    const leave = (): boolean => {
      const event = new Event('beforeunload', { cancelable: true });
      window.dispatchEvent(event);
      return event.defaultPrevented;
    };
    host.setDocument('Plan', false);
    expect(leave()).toBe(false);
    host.setDocument('Plan', true);
    expect(leave()).toBe(true);
    expect(document.title).toBe('• Plan – Soakwright');
  });
});
