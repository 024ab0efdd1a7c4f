import type { DemoPerson } from './people.ts';

function escaped(text: string): string {
  return text.replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);
}

function page(title: string, body: string): string {
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escaped(title)}</title><style>
body{font:16px/1.5 system-ui,sans-serif;margin:0;background:#f7f6f2;color:#1b262c}
main{max-width:34rem;margin:3rem auto;padding:0 1rem}
button{display:block;width:100%;min-height:56px;margin:0 0 8px;padding:8px 16px;text-align:left;font:inherit;
background:#fff;color:inherit;border:1px solid #56656c;border-radius:4px;cursor:pointer}
button:focus-visible{outline:3px solid #0b6e75;outline-offset:2px}
small{color:#42525a}
</style></head><body><main>${body}</main></body></html>`;
}

/** Page on which a demo person is chosen by one click. */
export function choicePage(uid: string, people: readonly DemoPerson[]): string {
  const buttons = people.map(
    (person) => `<button name="sub" value="${escaped(person.sub)}"><strong>${escaped(person.name)}</strong><br>
<small>${escaped(person.roles.join(', '))} · utility ${escaped(person.utility)}</small></button>`,
  );
  return page(
    'Who signs in?',
    `<h1>Who signs in?</h1><p>This is a stand-in for an identity provider, for trials only. Its people are invented and need no password.</p>
<form method="post" action="/interaction/${escaped(uid)}/person">${buttons.join('')}</form>`,
  );
}

/** Page that ends the session at the provider; the form is sent at once, the button stands in without scripts. */
export function signOutPage(form: string): string {
  return page(
    'Signing out',
    `<h1>Signing out</h1>${form}<button type="submit" form="op.logoutForm" name="logout" value="yes">Sign out</button>
<script>document.querySelector('button[name=logout]').click()</script>`,
  );
}

/** Page after a sign-out that names no way back. */
export function signedOutPage(): string {
  return page('Signed out', '<h1>Signed out</h1><p>You can close this page.</p>');
}
