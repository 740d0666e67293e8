import { createPinia, setActivePinia } from 'pinia';
import { beforeEach, describe, expect, it } from 'vitest';
import { removeLayer, renameLayer, setThickness, setTitle } from '../../../app/commands';
import { useProjectStore } from '../../../app/stores';
import { lining } from '../support/lining';

const thickness = (value: number) => setThickness(lining().part.layers[0], { value, text: `${value * 1000} mm` });
const firstThickness = () => useProjectStore().current.part.layers[0].thickness;

beforeEach(() => {
  setActivePinia(createPinia());
  useProjectStore().open(lining(), { name: 'lining.soak', token: 1 });
});

describe('edits', () => {
  it('an edit can be undone and made again, by name', () => {
    const project = useProjectStore();
    project.commit(thickness(0.2));
    expect([project.undoName, project.redoName, firstThickness()]).toEqual(['Thickness of Lining to 200 mm', null, 0.2]);
    project.undo();
    expect([project.undoName, project.redoName, firstThickness()]).toEqual([null, 'Thickness of Lining to 200 mm', 0.15]);
    project.redo();
    expect([project.undoName, firstThickness()]).toEqual(['Thickness of Lining to 200 mm', 0.2]);
  });

  it('a new edit after an undo forgets what was undone', () => {
    const project = useProjectStore();
    project.commit(thickness(0.2));
    project.undo();
    project.commit(setTitle('Other'));
    expect(project.redoName).toBeNull();
  });

  it('an edit that changes nothing is not kept', () => {
    const project = useProjectStore();
    project.commit(thickness(0.15));
    expect(project.undoName).toBeNull();
    expect(project.edited).toBe(false);
  });

  it('undoing everything makes the plan unedited again', () => {
    const project = useProjectStore();
    project.commit(thickness(0.2));
    expect(project.edited).toBe(true);
    project.undo();
    expect(project.edited).toBe(false);
  });
});

describe('a draft', () => {
  it('is shown, and not kept', () => {
    const project = useProjectStore();
    project.tryDraft(thickness(0.2));
    expect(firstThickness()).toBe(0.2);
    expect(project.committed.part.layers[0].thickness).toBe(0.15);
    expect([project.undoName, project.edited]).toEqual([null, false]);
    project.dropDraft();
    expect(firstThickness()).toBe(0.15);
  });

  it('starts each time from the committed plan', () => {
    const project = useProjectStore();
    project.tryDraft(renameLayer(lining().part.layers[1], 'Other'));
    project.tryDraft(thickness(0.2));
    expect(project.current.part.layers[1].name).toBe('Backing');
  });

  it('becomes one entry, however often it was tried', () => {
    const project = useProjectStore();
    for (const value of [0.16, 0.17, 0.18]) project.tryDraft(thickness(value));
    project.commitDraft();
    expect([project.undoName, firstThickness()]).toEqual(['Thickness of Lining to 180 mm', 0.18]);
    project.undo();
    expect([project.undoName, firstThickness()]).toEqual([null, 0.15]);
  });

  it('that is committed as it stands is not another plan', () => {
    const project = useProjectStore();
    project.tryDraft(thickness(0.2));
    const before = project.revision;
    project.commit(thickness(0.2));
    expect(project.revision).toBe(before);
    expect(project.undoName).toBe('Thickness of Lining to 200 mm');
  });

  it('is gone after an undo', () => {
    const project = useProjectStore();
    project.commit(thickness(0.2));
    project.tryDraft(thickness(0.3));
    project.undo();
    expect([project.draft, firstThickness()]).toEqual([null, 0.15]);
  });
});

describe('files', () => {
  it('undo survives a save, and what was undone then counts as an edit', () => {
    const project = useProjectStore();
    project.commit(thickness(0.2));
    project.markSaved({ name: 'a.soak', token: 2 });
    expect([project.edited, project.undoName]).toEqual([false, 'Thickness of Lining to 200 mm']);
    project.undo();
    expect(project.edited).toBe(true);
  });

  it('an edit made while the file was written is still unsaved', () => {
    const project = useProjectStore();
    const written = project.committed;
    project.commit(thickness(0.2));
    project.markSaved({ name: 'a.soak', token: 2 }, written);
    expect(project.edited).toBe(true);
  });

  it('opening another plan forgets the edits of the one before', () => {
    const project = useProjectStore();
    project.commit(thickness(0.2));
    project.newPlan();
    expect([project.undoName, project.edited, project.file]).toEqual([null, false, null]);
  });

  it('restored work is edited from the start', () => {
    const project = useProjectStore();
    project.restore(lining());
    expect([project.edited, project.file]).toEqual([true, null]);
  });
});

describe('problems', () => {
  it('are those of the plan on screen, found by their place', () => {
    const project = useProjectStore();
    expect(project.problems).toEqual([]);
    project.commit(removeLayer(lining().part.layers[1]));
    project.tryDraft(thickness(-1));
    expect(project.problemAt(['part', 'layers', 0, 'thickness'])).toMatch(/must be more than 0 m/);
    project.dropDraft();
    expect(project.problems).toEqual([]);
  });
});
