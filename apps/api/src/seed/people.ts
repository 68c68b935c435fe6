import type { Role } from '@trammel/shared/roles';

export interface DemoOrganisation {
  readonly name: string;
  readonly site: string;
  readonly supplierNumber: string;
  readonly people: readonly {
    readonly name: string;
    readonly title: string;
    readonly roles: readonly Role[];
    readonly maySign?: true;
  }[];
}

/** Every organisation and person of the demo is invented. */
export const customer: DemoOrganisation = {
  name: 'Tarnfell Drives',
  site: 'Tarnfell works',
  supplierNumber: '',
  people: [
    { name: 'Ines Carrow', title: 'Quality reviewer', roles: ['quality-reviewer'] },
    {
      name: 'Mirela Haddow',
      title: 'Quality approver',
      roles: ['quality-reviewer', 'administrator'],
      maySign: true,
    },
    { name: 'Tomasz Bellweather', title: 'Design engineer', roles: ['quality-reviewer'] },
    { name: 'Ravi Stonelake', title: 'Buyer', roles: ['purchasing'] },
    { name: 'Oda Fenn', title: 'Receiving inspection', roles: ['purchasing'] },
  ],
};

export const suppliers = {
  quillmark: {
    name: 'Quillmark Turning',
    site: 'Quillmark shop 1',
    supplierNumber: '4102',
    people: [
      { name: 'Joana Pell', title: 'Quality engineer', roles: ['supplier-quality'] },
      {
        name: 'Henrik Sall',
        title: 'Quality manager',
        roles: ['supplier-quality', 'administrator'],
        maySign: true,
      },
    ],
  },
  oberlyn: {
    name: 'Oberlyn Polymers',
    site: 'Oberlyn moulding hall',
    supplierNumber: '4117',
    people: [
      { name: 'Dario Wex', title: 'Quality engineer', roles: ['supplier-quality'] },
      {
        name: 'Petra Lohm',
        title: 'Plant quality lead',
        roles: ['supplier-quality', 'administrator'],
        maySign: true,
      },
    ],
  },
  dunmeric: {
    name: 'Dunmeric Pressings',
    site: 'Dunmeric press shop',
    supplierNumber: '4125',
    people: [
      { name: 'Sunniva Aarl', title: 'Quality engineer', roles: ['supplier-quality'] },
      {
        name: 'Colm Varga',
        title: 'Quality manager',
        roles: ['supplier-quality', 'administrator'],
        maySign: true,
      },
    ],
  },
  vesperholt: {
    name: 'Vesperholt Castings',
    site: 'Vesperholt foundry',
    supplierNumber: '4131',
    people: [
      { name: 'Bea Tindall', title: 'Quality engineer', roles: ['supplier-quality'] },
      {
        name: 'Ruben Osk',
        title: 'Quality manager',
        roles: ['supplier-quality', 'administrator'],
        maySign: true,
      },
    ],
  },
  askelund: {
    name: 'Askelund Stampings',
    site: 'Askelund press line',
    supplierNumber: '4140',
    people: [
      {
        name: 'Nils Orrey',
        title: 'Quality manager',
        roles: ['supplier-quality', 'administrator'],
        maySign: true,
      },
    ],
  },
} as const satisfies Record<string, DemoOrganisation>;

export type SupplierKey = keyof typeof suppliers;

export function mailOf(name: string, organisation: string): string {
  const plain = (text: string) =>
    text
      .toLowerCase()
      .replace(/[^a-z ]/g, '')
      .trim()
      .replaceAll(' ', '.');
  return `${plain(name)}@${organisation.toLowerCase().split(' ')[0] ?? 'demo'}.example`;
}
