import type { ReplyOf } from '#shared/contracts/endpoint.ts';
import {
  inclusionPath,
  type RegistryRow,
  type registryApi,
  registryHeadPath,
  registryPath,
  registryStateWords,
  registryWords,
} from '#shared/contracts/registry.ts';
import { readableFingerprint } from '#shared/ledger/readable-fingerprint.ts';
import { type Html, html } from './html.ts';
import { count, facts, frame, section, utc } from './page-parts.ts';

type Registry = ReplyOf<typeof registryApi.list>;

function entry(organisationId: string, row: RegistryRow): Html {
  const { index, version, digest, sealedAt, state, title, sessions, publication } = row;
  const held = sessions === null ? '' : `, ${count(sessions, 'session')}`;
  return html`<li class="flex min-w-0 flex-col gap-1.5 border-b border-rule py-4">
    <h3 class="text-lg">${title ?? `Entry ${index + 1}`}</h3>
    <p>${registryStateWords[state]}${held}. ${publication === null ? null : html`<a href="/p/${publication}">Read it</a>`}</p>
    <p class="text-soft">Sealed ${utc(sealedAt)}${version > 1 ? `, version ${version}` : ''}</p>
    <code class="break-all">${digest}</code>
    <p><a href="${inclusionPath(organisationId, index)}" download>Proof that entry ${index + 1} is in the log</a></p>
  </li>`;
}

/** An organisation's registry in plain markup. */
export function registryContent(organisationId: string, registry: Registry): Html {
  const { rows, total, page, pages, organisation, head } = registry;
  const log =
    head === null
      ? html`<p class="text-soft">There is a head as soon as a protocol is sealed.</p>`
      : html`<p class="max-w-3xl">${registryWords.kept}</p>
          <p><a href="${registryHeadPath(organisationId)}" download>Download the head</a></p>
          ${facts([
            { label: 'Entries', value: String(head.size) },
            { label: 'Root', value: html`<code>${head.root}</code>` },
            { label: 'Signed', value: utc(head.at) },
            { label: 'Fingerprint of the key', value: html`<code>${readableFingerprint(head.key)}</code>` },
          ])}
          <p class="max-w-3xl text-soft">${registryWords.notShown}</p>`;
  return frame(
    'Registry',
    html`<div class="flex flex-col gap-12">
      <div class="flex max-w-3xl flex-col gap-3"><h1 class="text-3xl">Sealed protocols of ${organisation}</h1><p class="text-lg text-soft">${registryWords.what}</p></div>
      ${section(
        'Entries, newest first',
        rows.length === 0
          ? html`<p class="text-soft">No entry is like that.</p>`
          : html`<ol class="max-w-4xl border-t-2 border-ink">${rows.map((row) => entry(organisationId, row))}</ol>
              <p class="text-soft">Page ${page} of ${pages}, ${total === 1 ? '1 entry' : `${total} entries`}.</p>
              ${page < pages ? html`<p><a href="${registryPath(organisationId)}?page=${page + 1}">Older</a></p>` : null}`,
      )}
      ${section('The head of the log', log)}
    </div>`,
  );
}
