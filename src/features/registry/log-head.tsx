import { type RegistryHead, registryHeadPath, registryWords } from '#shared/contracts/registry.ts';
import { readableFingerprint } from '#shared/ledger/readable-fingerprint.ts';
import { formatDateTime } from '../../lib/format.ts';
import { buttonLook } from '../../ui/button-look.ts';
import { CopyButton } from '../../ui/copy-button.tsx';

/** The signed head of the log, to be kept. */
export function LogHead({ organisationId, head }: { organisationId: string; head: RegistryHead }) {
  return (
    <section aria-labelledby="head" className="flex min-w-0 flex-col gap-3 border-t-2 border-ink pt-4">
      <h2 id="head" className="text-base font-bold">
        The head of the log
      </h2>
      <p className="text-soft">{registryWords.kept}</p>
      <a
        href={registryHeadPath(organisationId)}
        download="registry-head.json"
        className={buttonLook('plain', 'normal')}
      >
        Download the head
      </a>
      <p className="text-soft">
        Root over {head.size === 1 ? '1 entry' : `${head.size} entries`}, signed {formatDateTime(head.at)}
      </p>
      <code className="break-all">{head.root}</code>
      <p className="text-soft">Fingerprint of the key that signed it</p>
      <code>{readableFingerprint(head.key)}</code>
      <CopyButton text={head.key} label="Copy the fingerprint" />
      <p className="text-soft">{registryWords.notShown}</p>
    </section>
  );
}
