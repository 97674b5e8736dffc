import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { QueryOf } from '#shared/contracts/endpoint.ts';
import { mailApi, mailboxApi } from '#shared/contracts/mail.ts';
import { call } from '../../lib/call.ts';

export type MailListQuery = QueryOf<typeof mailApi.list>;
export type MailboxQuery = QueryOf<typeof mailboxApi.list>;

export const mailQueries = {
  all: () => ['mail'] as const,
  list: (organisationId: string, query: MailListQuery) =>
    queryOptions({
      queryKey: [...mailQueries.all(), 'list', organisationId, query],
      queryFn: ({ signal }) => call(mailApi.list, { params: { organisationId }, query }, signal),
    }),
  mailbox: (query: MailboxQuery) =>
    queryOptions({
      queryKey: [...mailQueries.all(), 'mailbox', query],
      queryFn: ({ signal }) => call(mailboxApi.list, { query }, signal),
    }),
  mailboxMail: (id: string) =>
    queryOptions({
      queryKey: [...mailQueries.all(), 'mailbox-mail', id],
      queryFn: ({ signal }) => call(mailboxApi.get, { params: { id } }, signal),
    }),
};

export function useSendAgain(organisationId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: string) => call(mailApi.sendAgain, { params: { organisationId, id } }),
    onSuccess: () => client.invalidateQueries({ queryKey: mailQueries.all() }),
  });
}
