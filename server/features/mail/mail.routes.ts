import type { Request, Router } from 'express';
import { mailApi, mailboxApi } from '#shared/contracts/mail.ts';
import { Problem } from '#shared/problem.ts';
import type { Deps } from '../../deps.ts';
import type { Access } from '../../http/access.ts';
import { mount } from '../../http/mount.ts';
import * as mail from './mail.service.ts';
import { mayReadMailbox } from './mailbox-access.ts';

export function mailRoutes(router: Router, access: Access, deps: Deps): void {
  mount(router, access, mailApi.list, async ({ query }, who) => mail.listMail(deps, who.organisationId, query));
  mount(router, access, mailApi.sendAgain, async ({ params }) => mail.sendAgain(deps, params));

  const requireMailbox = (request: Request) => {
    if (!mayReadMailbox(deps.config, request)) throw new Problem('not-found', 'There is nothing at this address.');
  };
  mount(router, access, mailboxApi.list, async ({ query, request }) => {
    requireMailbox(request);
    return mail.listKept(deps, query);
  });
  mount(router, access, mailboxApi.get, async ({ params, request }) => {
    requireMailbox(request);
    return mail.getKept(deps, params.id);
  });
}
