/** Invented people for a registry on one's own machine: the stand-in for sign-in offers them, the demo registry uses them. */
export interface InventedOrganisation {
  slug: string;
  name: string;
  kind: 'provider' | 'laboratory' | 'buyer' | 'registry';
}

export interface InventedPerson {
  /** Subject at the stand-in. */
  subject: string;
  name: string;
  email: string;
  /** What they are, in words. */
  part: string;
  organisation: string | null;
  membership: 'contributor' | 'editor' | 'viewer' | 'member' | null;
  roles: readonly ('curator' | 'steward')[];
}

export const inventedOrganisations: readonly InventedOrganisation[] = [
  { slug: 'larkspur-quantics', name: 'Larkspur Quantics', kind: 'provider' },
  { slug: 'fellside-ion-works', name: 'Fellside Ion Works', kind: 'provider' },
  { slug: 'osierbank-devices', name: 'Osierbank Devices', kind: 'provider' },
  { slug: 'pellmere-instruments', name: 'Pellmere Instruments', kind: 'provider' },
  { slug: 'saltmarsh-atoms', name: 'Saltmarsh Atoms', kind: 'provider' },
  { slug: 'tolland-vale-photonics', name: 'Tolland Vale Photonics', kind: 'provider' },
  { slug: 'brackenholt-spin-works', name: 'Brackenholt Spin Works', kind: 'provider' },
  { slug: 'withy-lane-laboratory', name: 'Withy Lane Laboratory', kind: 'laboratory' },
  { slug: 'greywether-computing', name: 'Greywether Computing', kind: 'buyer' },
  { slug: 'evenbeam-office', name: 'Evenbeam office', kind: 'registry' },
];

const person = (subject: string, name: string, home: string | null, part: string, membership: InventedPerson['membership'], roles: InventedPerson['roles'] = []): InventedPerson => ({
  subject: `invented-${subject}`,
  name,
  email: `${subject}@${home ?? 'evenbeam'}.example`,
  part,
  organisation: home,
  membership,
  roles,
});

export const inventedPeople: readonly InventedPerson[] = [
  person('ida.marsh', 'Ida Marsh', 'larkspur-quantics', 'Contributor, Larkspur Quantics', 'contributor'),
  person('tom.ashdown', 'Tom Ashdown', 'fellside-ion-works', 'Contributor, Fellside Ion Works', 'contributor'),
  person('noor.teasel', 'Noor Teasel', 'osierbank-devices', 'Contributor, Osierbank Devices', 'contributor'),
  person('per.alder', 'Per Alder', 'pellmere-instruments', 'Contributor, Pellmere Instruments', 'contributor'),
  person('mirela.sedge', 'Mirela Sedge', 'saltmarsh-atoms', 'Contributor, Saltmarsh Atoms', 'contributor'),
  person('oona.vale', 'Oona Vale', 'tolland-vale-photonics', 'Contributor, Tolland Vale Photonics', 'contributor'),
  person('jonas.bracken', 'Jonas Bracken', 'brackenholt-spin-works', 'Contributor, Brackenholt Spin Works', 'contributor'),
  person('wanda.rushworth', 'Wanda Rushworth', 'withy-lane-laboratory', 'Contributor, Withy Lane Laboratory', 'contributor'),
  person('hale.brook', 'Hale Brook', 'withy-lane-laboratory', 'Curator, and member of Withy Lane Laboratory', 'member', ['curator']),
  person('ruth.holloway', 'Ruth Holloway', 'evenbeam-office', 'Curator', 'member', ['curator']),
  person('emil.corrie', 'Emil Corrie', 'evenbeam-office', 'Curator', 'member', ['curator']),
  person('dana.fenwick', 'Dana Fenwick', 'greywether-computing', 'Buyer, Greywether Computing (editor)', 'editor'),
  person('luc.overton', 'Luc Overton', 'greywether-computing', 'Buyer, Greywether Computing (viewer)', 'viewer'),
  person('agnes.thorne', 'Agnes Thorne', 'evenbeam-office', 'Steward', 'member', ['steward']),
  person('kit.wren', 'Kit Wren', null, 'Member, no organisation', null),
];
