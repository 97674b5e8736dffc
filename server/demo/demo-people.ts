import type { Role } from '#shared/contracts/endpoint.ts';

export type DemoPersonKey = 'owner' | 'manager' | 'codeHolder' | 'proctor' | 'reviewer';

/** The demo's people. Their passwords are no secret: they open invented data, and are shown on the demo's own machine only. */
export const demoPeople: readonly {
  key: DemoPersonKey;
  name: string;
  duty: string;
  email: string;
  password: string;
  role: Role;
}[] = [
  {
    key: 'manager',
    name: 'Maren Oduya',
    duty: 'Product manager: plans, seals, closes, reads the report, publishes',
    email: 'manager@fairlead.example',
    password: 'open-the-sleeve-1',
    role: 'manager',
  },
  {
    key: 'proctor',
    name: 'Tomas Brandt',
    duty: 'Proctor: runs the sessions',
    email: 'proctor@fairlead.example',
    password: 'open-the-sleeve-2',
    role: 'proctor',
  },
  {
    key: 'codeHolder',
    name: 'Ines Halloran',
    duty: 'Code holder: sleeves and codes the specimens',
    email: 'codes@fairlead.example',
    password: 'open-the-sleeve-3',
    role: 'reviewer',
  },
  {
    key: 'reviewer',
    name: 'Piet Lindqvist',
    duty: 'Reviewer: checks a result',
    email: 'reviewer@fairlead.example',
    password: 'open-the-sleeve-4',
    role: 'reviewer',
  },
  {
    key: 'owner',
    name: 'Adaeze Kowal',
    duty: 'Owner: the organisation',
    email: 'owner@fairlead.example',
    password: 'open-the-sleeve-5',
    role: 'owner',
  },
];
