/** What the samples are about, in the order in which they are offered. The title and the rest stand in the files. */
export interface Sample {
  /** Name of the file without its ending. */
  readonly id: string;
  readonly title: string;
  /** What it asks, in one line. */
  readonly question: string;
  readonly trade: string;
}

export const samples: readonly Sample[] = [
  {
    id: 'dry-out-lining',
    title: 'Ladle lining, first dry-out',
    question: 'When is the cold side past the steam range?',
    trade: 'Refractories',
  },
  {
    id: 'forged-block',
    title: 'Forged block before the quench',
    question: 'When does the soak of the middle begin?',
    trade: 'Heat treatment',
  },
  {
    id: 'mould-preheat',
    title: 'Mould half, preheat before pouring',
    question: 'Is the cavity warm enough at the pour?',
    trade: 'Casting',
  },
  {
    id: 'panel-cure',
    title: 'Bonded panel, oven cure',
    question: 'Do both glue lines get their hour at heat?',
    trade: 'Composites',
  },
  {
    id: 'press-stack',
    title: 'Press stack, ten boards at once',
    question: 'When does the board in the middle begin to cure?',
    trade: 'Laminates',
  },
  {
    id: 'tray-chill',
    title: 'Chilled tray, through the band in time',
    question: 'Is it through the band fast enough?',
    trade: 'Food',
  },
  {
    id: 'wall-stripping',
    title: 'Concrete wall, stripping the insulation',
    question: 'When may the mats come off?',
    trade: 'Construction',
  },
];
