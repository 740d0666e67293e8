/**
 * Who may import whom: the whole rule in three tables, read by eslint/rooms.js.
 *
 * A room is a folder; a file belongs to the deepest room that holds it. A room imports itself freely, the rooms of its row only
 * through their index, and nothing else of ours. `type:` allows only types of a file, `url:` only its address in `new URL`.
 */
const solverBelow = {
  linear: [],
  model: ['solver/model/migrations', 'solver/model/quantities'],
  materials: ['solver/model'],
  grid: ['solver/model', 'solver/materials'],
  heat: ['solver/model', 'solver/materials', 'solver/grid', 'solver/linear'],
  stepping: ['solver/model', 'solver/materials', 'solver/grid', 'solver/heat', 'solver/linear'],
  measures: ['solver/model', 'solver/materials', 'solver/grid', 'solver/heat', 'solver/stepping'],
};
const physics = Object.keys(solverBelow).map((room) => `solver/${room}`);

/** What every part of the app may see of the solver. */
const plan = ['solver/model', 'solver/model/quantities', 'solver/materials', 'solver/service/protocol'];
const meetingPlaces = ['app/stores', 'app/commands', 'app/draw', 'app/ui'];

export const features = [
  'part',
  'cycle',
  'requirements',
  'section',
  'timeline',
  'answers',
  'start',
  'planning',
  'materials',
  'record',
];

export const rooms = {
  ...Object.fromEntries(Object.entries(solverBelow).map(([room, below]) => [`solver/${room}`, below])),
  'solver/model/migrations': [],
  'solver/model/quantities': [],
  'solver/planning': [...physics],
  'solver/service/protocol': ['solver/model'],
  'solver/service/runner': [...physics, 'solver/planning', 'solver/service/protocol'],
  'solver/service/hosts': ['solver/model', 'solver/planning', 'solver/service/protocol', 'solver/service/runner'],
  'solver/service': ['solver/model', 'solver/service/protocol', 'solver/service/runner', 'solver/service/hosts'],

  app: [...plan, ...meetingPlaces, 'app/bridge', 'samples', ...features.map((feature) => `app/${feature}`)],
  'app/stores': [...plan, 'app/commands', 'app/draw', 'app/bridge', 'type:app/bridge/contract', 'samples'],
  'app/commands': plan,
  'app/draw': plan,
  'app/ui': [...plan, 'app/commands', 'app/draw'],
  'app/bridge': ['solver/service/protocol', 'type:main/desktop/contract', 'url:solver/service/hosts/worker.ts'],
  ...Object.fromEntries(features.map((feature) => [`app/${feature}`, [...plan, ...meetingPlaces, 'type:app/bridge', 'samples']])),

  main: [],
  'main/files': [],
  'main/desktop': ['main', 'main/files', 'solver/service/protocol'],
  'main/browser': ['main', 'samples'],
  'main/cli': ['main/files', 'solver/model', 'solver/materials', 'solver/service', 'solver/service/protocol', 'samples'],
  samples: [],
};

/** Outside all rooms, and open to each of them that runs on a screen: the program's own name and version. */
export const manifest = 'package.json';

/** Inside a room: files that must not know each other (path starts, without ending). */
export const strangers = [{ from: 'app/stores/project', to: 'app/stores/run' }];

/** Packages by who may import them, by path start; `node:` stands for every module of Node. A package not listed is refused. */
export const packages = {
  'node:': { in: ['solver/service/hosts', 'main'], notIn: ['main/desktop/preload'] },
  electron: { in: ['main/desktop'] },
  'electron-log': { in: ['main/desktop'], notIn: ['main/desktop/preload'] },
  zod: { in: ['solver/model', 'solver/service/protocol', 'app/stores', 'main/desktop'], notIn: ['main/desktop/preload'] },
  mathjs: { in: ['solver/model', 'solver/materials', 'app'] },
  vue: { in: ['app'], notIn: ['app/draw', 'app/commands'] },
  pinia: { in: ['app'], notIn: ['app/draw', 'app/commands', 'app/bridge', 'app/ui'] },
  'reka-ui': { in: ['app'], notIn: ['app/draw', 'app/commands', 'app/bridge', 'app/stores'] },
  '@lucide/vue': { in: ['app'], notIn: ['app/draw', 'app/commands', 'app/bridge', 'app/stores'] },
  'chart.js': { in: ['app'], notIn: ['app/draw', 'app/commands', 'app/bridge', 'app/stores'] },
};
