import type { DemoRole } from './contract';

interface DemoPerson {
  readonly name: string;
  readonly email: string;
  readonly role: DemoRole;
}

/** The invented team of the demo. One-click sign-in takes the first person of a role. */
export const DEMO_PEOPLE: readonly DemoPerson[] = [
  { name: 'Mara Kell', email: 'mara.kell@lantern.example', role: 'lead' },
  { name: 'Tobin Ashgrove', email: 'tobin.ashgrove@lantern.example', role: 'researcher' },
  { name: 'Sefa Lund', email: 'sefa.lund@lantern.example', role: 'researcher' },
  { name: 'Ines Harrowgate', email: 'ines.harrowgate@lantern.example', role: 'reviewer' },
  { name: 'Orla Quist', email: 'orla.quist@lantern.example', role: 'reviewer' },
  { name: 'Bram Teasdale', email: 'bram.teasdale@lantern.example', role: 'instructor' },
  { name: 'Wilma Oake', email: 'wilma.oake@lantern.example', role: 'admin' },
];

export const demoPerson = (role: DemoRole): DemoPerson => DEMO_PEOPLE.find((person) => person.role === role)!;
