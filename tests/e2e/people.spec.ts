import { expect, type Page, test } from '@playwright/test';
import { expectAccessible } from './accessible.ts';
import { type RunningFairlead, runFairlead } from './run-fairlead.ts';

// A first start without the demo: the printed link makes organisation and owner, who invites; the invited joins by the
// mail in the mailbox, forgets the password, sets another, and is made a reviewer and removed.

let fairlead: RunningFairlead;
test.beforeAll(async () => {
  fairlead = await runFairlead({ FAIRLEAD_DEMO: 'off' });
});
test.afterAll(async () => {
  await fairlead.stop();
});

const invitedAddress = 'runa@harbour.example';

/** Opens the newest mail with these words in the mailbox, and follows its link. */
async function followMail(page: Page, words: RegExp): Promise<void> {
  await page.goto(`${fairlead.address}/mailbox`);
  await page.getByRole('link', { name: words }).first().click();
  await expect(page.getByRole('heading', { name: words })).toBeVisible();
  await expectAccessible(page, 'a mail');
  await page.getByRole('list', { name: 'Links in this mail' }).getByRole('link').first().click();
}

test('from an empty Fairlead to an organisation with members [P1] [P2] [P12] [M7]', async ({ browser }) => {
  const link = fairlead.said.match(/http\S+\/first-owner#\S+/)?.[0];
  if (link === undefined) throw new Error(`no link was printed: ${fairlead.said}`);
  const owner = await (await browser.newContext()).newPage();
  await owner.goto(link);
  await expect(owner.getByRole('button', { name: 'Create the organisation' })).toBeVisible();
  await expectAccessible(owner, 'first owner');
  await owner.getByRole('button', { name: 'Create the organisation' }).click();
  await expect(owner.getByText('4 fields above need a look.')).toBeVisible();
  await owner.getByRole('textbox', { name: 'Organisation' }).fill('Harbour Audio Works');
  await owner.getByRole('textbox', { name: 'Your name' }).fill('Edda Quist');
  await owner.getByRole('textbox', { name: 'E-mail' }).fill('edda@harbour.example');
  await owner.getByRole('textbox', { name: 'Password' }).fill('a very long passphrase');
  await owner.getByRole('button', { name: 'Create the organisation' }).click();

  await expect(owner.getByRole('heading', { name: 'What waits for you' })).toBeVisible();
  await expectAccessible(owner, 'the home of an owner alone');
  await owner.getByRole('link', { name: 'Invite the others' }).click();
  await expect(owner.getByRole('heading', { name: 'People' })).toBeVisible();
  await expectAccessible(owner, 'people');
  await owner.getByRole('button', { name: 'Invite somebody' }).click();
  await expect(owner.getByRole('button', { name: 'Send the invitation' })).toBeVisible();
  await expectAccessible(owner, 'the form for an invitation');
  await owner.getByRole('button', { name: 'Send the invitation' }).click();
  await expect(owner.getByText('2 fields above need a look.')).toBeVisible();
  await owner.getByRole('textbox', { name: 'E-mail' }).fill(invitedAddress);
  await owner.getByRole('radio', { name: 'Proctor' }).check();
  await owner.getByRole('button', { name: 'Send the invitation' }).click();
  await owner.getByRole('link', { name: 'Invitations (1 open)' }).click();
  await expect(owner.getByText(invitedAddress).first()).toBeVisible();
  await expectAccessible(owner, 'invitations');

  const guest = await (await browser.newContext()).newPage();
  await followMail(guest, /invites you to Harbour Audio Works/);
  await expect(guest.getByRole('heading', { name: 'Join Harbour Audio Works' })).toBeVisible();
  await expectAccessible(guest, 'an invitation');
  await guest.getByRole('textbox', { name: 'Your name' }).fill('Runa Falk');
  await guest.getByRole('textbox', { name: 'Password' }).fill('another long passphrase');
  await guest.getByRole('button', { name: 'Accept and join' }).click();
  await expect(guest.getByRole('heading', { name: 'What waits for you' })).toBeVisible();

  // A manager is invited too, and accepts.
  await owner.getByRole('link', { name: 'People', exact: true }).first().click();
  await expect(owner.getByRole('heading', { name: 'People' })).toBeVisible();
  await owner.getByRole('button', { name: 'Invite somebody' }).click();
  await owner.getByRole('textbox', { name: 'E-mail' }).fill('ivo@harbour.example');
  await owner.getByRole('radio', { name: 'Product manager' }).check();
  await owner.getByRole('button', { name: 'Send the invitation' }).click();
  await expect(owner.getByRole('link', { name: 'Invitations (1 open)' })).toBeVisible();
  const second = await (await browser.newContext()).newPage();
  await followMail(second, /invites you to Harbour Audio Works/);
  await second.getByRole('textbox', { name: 'Your name' }).fill('Ivo Sander');
  await second.getByRole('textbox', { name: 'Password' }).fill('a third long passphrase');
  await second.getByRole('button', { name: 'Accept and join' }).click();
  await expect(second.getByRole('link', { name: 'Studies' })).toBeVisible();

  await guest.getByRole('button', { name: 'Runa Falk' }).click();
  await guest.getByRole('menuitem', { name: 'Your sign-ins' }).click();
  await expect(guest.getByText('This one')).toBeVisible();
  await expectAccessible(guest, 'sign-ins');

  const elsewhere = await (await browser.newContext()).newPage();
  await elsewhere.goto(`${fairlead.address}/sign-in`);
  await elsewhere.getByRole('link', { name: 'Forgotten your password?' }).click();
  await expect(elsewhere.getByRole('heading', { name: 'Forgotten your password?' })).toBeVisible();
  await expectAccessible(elsewhere, 'forgotten password');
  await elsewhere.getByRole('textbox', { name: 'E-mail' }).fill(invitedAddress);
  await elsewhere.getByRole('button', { name: 'Send me a link' }).click();
  await expect(elsewhere.getByRole('heading', { name: 'Look into your mail' })).toBeVisible();
  await followMail(elsewhere, /Set a new password/);
  await expect(elsewhere.getByRole('textbox', { name: 'New password' })).toBeVisible();
  await expectAccessible(elsewhere, 'new password');
  const usedLink = elsewhere.url();
  await elsewhere.getByRole('textbox', { name: 'New password' }).fill('a third long passphrase');
  await elsewhere.getByRole('button', { name: 'Set the password' }).click();
  await expect(elsewhere.getByRole('heading', { name: 'Sign in' })).toBeVisible();
  await elsewhere.getByRole('textbox', { name: 'E-mail' }).fill(invitedAddress);
  await elsewhere.getByRole('textbox', { name: 'Password' }).fill('a third long passphrase');
  await elsewhere.getByRole('button', { name: 'Sign in' }).click();
  await elsewhere.waitForURL(/organisations/);
  await guest.reload();
  await expect(guest.getByRole('heading', { name: 'Sign in' })).toBeVisible();
  await guest.goto(usedLink);
  await expect(guest.getByText('This link has been used, or its hour is over.')).toBeVisible();

  await owner.goto(owner.url().replace('/invitations', ''));
  await owner.getByRole('button', { name: 'Change: Runa Falk' }).click();
  await owner.getByRole('menuitem', { name: 'Make reviewer' }).click();
  await expect(owner.getByRole('alertdialog')).toBeVisible();
  await expectAccessible(owner, 'a question');
  await owner.getByRole('button', { name: 'Make reviewer' }).click();
  await expect(owner.getByRole('row', { name: /Runa Falk.*Reviewer/ })).toBeVisible();
  await owner.getByRole('button', { name: 'Change: Edda Quist' }).click();
  await owner.getByRole('menuitem', { name: 'Remove' }).click();
  await owner.getByRole('button', { name: 'Remove', exact: true }).click();
  await expect(owner.getByText('Edda Quist is the only owner.')).toBeVisible();
  await owner.getByRole('button', { name: 'Keep as a member' }).click();
  await owner.getByRole('button', { name: 'Change: Runa Falk' }).click();
  await owner.getByRole('menuitem', { name: 'Remove' }).click();
  await owner.getByRole('button', { name: 'Remove', exact: true }).click();
  await expect(owner.getByRole('row', { name: /Runa Falk/ })).toHaveCount(0);
  await elsewhere.reload();
  await expect(elsewhere.getByText('There is nothing at this address.')).toBeVisible();

  await owner.getByRole('link', { name: 'Mail', exact: true }).click();
  await expect(owner.getByRole('row', { name: /You are no longer a member/ })).toBeVisible();
  await expectAccessible(owner, 'mail');
});
