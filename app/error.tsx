"use client";

import { Lead, Opening, Page } from "./_ui/Page";

/** What a page says when the server failed while making it. */
export default function PageError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <Page>
      <Opening title="This page could not be made">
        <Lead>
          The server failed on it. Nothing that was submitted is lost: submissions and checks are kept before they are
          answered.
        </Lead>
        <p>
          <button type="button" onClick={reset}>
            Try again
          </button>
        </p>
        {error.digest !== undefined && (
          <p>
            The server’s own output tells more under the number <code>{error.digest}</code>.
          </p>
        )}
      </Opening>
    </Page>
  );
}
