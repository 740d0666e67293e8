/**
 * The document on the desk: begun, opened, saved, recovered. Nothing edited is lost without having been asked about.
 *
 * What is asked is a promise that the dialog settles, so that every road (menu, key, drop, closing the window) is the same.
 */
import { getCurrentScope, onScopeDispose, ref, shallowRef, watch, type Ref, type ShallowRef } from 'vue';
import type { CloseChoice, FileRef, Host, JournalEntry, OpenedFile, RecentFile } from '../bridge';
import { useProjectStore, useViewStore } from '../stores';
import { readProject, wordProblem, writeProject, type Project } from '../../solver/model';

/** Something to tell about files, until it is closed or answered. */
export interface Notice {
  kind: 'info' | 'warn' | 'bad';
  title: string;
  /** What it touches and what to do. */
  text?: string;
  /** Places and what is wrong there. */
  lines?: readonly string[];
  actions?: readonly { label: string; act: () => void }[];
}

export interface Desk {
  screen: Ref<'start' | 'plan'>;
  notice: ShallowRef<Notice | null>;
  /** The question whether to save first, while it is asked. */
  question: ShallowRef<{ title: string; answer: (choice: CloseChoice) => void } | null>;
  /** Unsaved work of an earlier session, until it is restored or discarded. */
  recovery: ShallowRef<JournalEntry | null>;
  recent: ShallowRef<readonly RecentFile[]>;
  newPlan(): Promise<void>;
  openFile(): Promise<void>;
  openDropped(file: File): Promise<void>;
  openRecent(file: RecentFile): Promise<void>;
  openSample(project: Project): Promise<void>;
  forgetRecent(): Promise<void>;
  save(): Promise<boolean>;
  saveAs(): Promise<boolean>;
  restore(): Promise<void>;
  discardRecovery(): Promise<void>;
}

/** Time after the last edit until the journal holds it, ms. */
const JOURNAL_MS = 1500;

export function useDesk(host: Host): Desk {
  const project = useProjectStore();
  const view = useViewStore();
  const screen = ref<'start' | 'plan'>('start');
  const notice = shallowRef<Notice | null>(null);
  const question = shallowRef<Desk['question']['value']>(null);
  const recovery = shallowRef<JournalEntry | null>(null);
  const recent = shallowRef<readonly RecentFile[]>([]);

  const tell = (next: Notice): void => void (notice.value = next);
  const fail = (title: string, error: unknown): void =>
    tell({ kind: 'bad', title, text: error instanceof Error ? error.message : String(error) });

  /** A field that is being typed in is kept, as by leaving it. */
  function finishTyping(): void {
    if (document.activeElement instanceof HTMLElement && document.activeElement.matches('input, select, textarea')) {
      document.activeElement.blur();
    }
  }

  /** Whether the plan may be left: saved, given up, or without edits. */
  async function mayLeave(): Promise<boolean> {
    finishTyping();
    if (!project.edited) return true;
    const choice = await new Promise<CloseChoice>((answer) => {
      question.value = { title: project.committed.title, answer };
    });
    question.value = null;
    if (choice === 'save') return save();
    return choice === 'discard';
  }

  function show(): void {
    notice.value = null;
    view.reset();
    screen.value = 'plan';
  }

  async function newPlan(): Promise<void> {
    if (!(await mayLeave())) return;
    project.newPlan();
    show();
  }

  async function openSample(sample: Project): Promise<void> {
    if (!(await mayLeave())) return;
    project.open(sample, null);
    show();
  }

  /** Opens what `read` gives, after asking about the plan on the desk. */
  async function openFrom(read: () => Promise<OpenedFile | null>): Promise<void> {
    if (!(await mayLeave())) return;
    let file: OpenedFile | null;
    try {
      file = await read();
    } catch (error) {
      return fail('The file could not be opened.', error);
    }
    if (file !== null) take(file);
    void listRecent();
  }

  function take({ ref: file, text }: OpenedFile): void {
    const result = readProject(text);
    if (result.kind === 'project') {
      project.open(result.project, file);
      show();
      if (result.migratedFrom !== null) {
        tell({ kind: 'info', title: `${file.name} is of an older format.`, text: 'Saving it writes the format of today.' });
      }
    } else if (result.kind === 'newer') {
      tell({ kind: 'warn', title: `${file.name} was not opened.`, text: result.message });
    } else {
      const lines = result.problems.map(wordProblem);
      const count = lines.length === 1 ? 'One place has' : `${lines.length} places have`;
      tell({ kind: 'bad', title: `${file.name} was not opened.`, text: `${count} to be put right first:`, lines });
    }
  }

  async function write(to: FileRef | null, options: { overwriteChanged?: boolean } = {}): Promise<boolean> {
    finishTyping();
    const written = project.committed;
    try {
      const outcome = await host.saveFile(writeProject(written), to, fileName(written.title), options);
      if (outcome.kind === 'saved') {
        project.markSaved(outcome.ref, written);
        notice.value = null;
        void listRecent();
        return true;
      }
      if (outcome.kind === 'failed') fail('The plan was not saved.', outcome.message);
      if (outcome.kind === 'changed-on-disk') askAboutChange(outcome.ref);
    } catch (error) {
      fail('The plan was not saved.', error);
    }
    return false;
  }

  function askAboutChange(file: FileRef): void {
    tell({
      kind: 'warn',
      title: `${file.name} changed on disk since you opened it.`,
      text: 'Saving now would replace the other version.',
      actions: [
        { label: 'Save a copy', act: () => void write(null) },
        { label: 'Replace it', act: () => void write(file, { overwriteChanged: true }) },
      ],
    });
  }

  const save = (): Promise<boolean> => write(project.file);

  async function listRecent(): Promise<void> {
    recent.value = await host.recentFiles().catch(() => []);
  }

  async function restore(): Promise<void> {
    const entry = recovery.value;
    if (entry === null || !(await mayLeave())) return;
    const result = readProject(entry.text);
    if (result.kind !== 'project') return tell({ kind: 'bad', title: 'The unsaved work could not be read.' });
    recovery.value = null;
    project.restore(result.project);
    show();
  }

  async function discardRecovery(): Promise<void> {
    recovery.value = null;
    if (!project.edited) await host.journal.clear().catch(() => undefined);
  }

  /** Keeps the journal abreast of the plan: written a little after an edit, cleared when nothing is unsaved. */
  function keepJournal(): void {
    let timer: ReturnType<typeof setTimeout> | undefined;
    watch(
      () => [project.committed, project.edited] as const,
      ([plan, edited]) => {
        clearTimeout(timer);
        host.setDocument(plan.title, edited);
        timer = setTimeout(() => void writeJournal(plan, edited), JOURNAL_MS);
      },
      { immediate: true },
    );
    onScopeDispose(() => clearTimeout(timer));
  }

  let journalHolds = false;
  async function writeJournal(plan: Project, edited: boolean): Promise<void> {
    if (!edited && !journalHolds) return;
    journalHolds = edited;
    const entry = {
      title: plan.title,
      edited: new Date().toISOString(),
      text: writeProject(plan),
      fileName: project.file?.name ?? null,
    };
    await (edited ? host.journal.write(entry) : host.journal.clear()).catch(() => undefined);
  }

  async function close(): Promise<void> {
    if (!(await mayLeave())) return;
    await host.journal.clear().catch(() => undefined);
    host.closeNow();
  }

  onScopeDispose(host.onCloseRequest(() => void close()));
  onScopeDispose(
    host.onOpenRequest(
      (file) => void openFrom(async () => file),
      (message) => fail('The file could not be opened.', message),
    ),
  );
  const scope = getCurrentScope();
  void host.journal
    .read()
    .then((entry) => (recovery.value = entry))
    .catch(() => undefined)
    .finally(() => scope?.run(keepJournal));
  void listRecent();

  return {
    screen,
    notice,
    question,
    recovery,
    recent,
    newPlan,
    openSample,
    openFile: () => openFrom(() => host.openFile()),
    openDropped: (file) => openFrom(() => host.openDropped(file)),
    openRecent: (file) => openFrom(() => host.openRecent(file)),
    async forgetRecent() {
      await host.forgetRecentFiles().catch(() => undefined);
      await listRecent();
    },
    save,
    saveAs: () => write(null),
    restore,
    discardRecovery,
  };
}

/** A file name from a title: what no file system minds. */
export function fileName(title: string): string {
  const plain = title
    .replace(/[\\/:*?"<>|\p{Cc}]+/gu, ' ')
    .replace(/\s+/g, ' ')
    .replace(/^[. ]+|[. ]+$/g, '')
    .slice(0, 80);
  return `${plain || 'Untitled plan'}.soak`;
}
