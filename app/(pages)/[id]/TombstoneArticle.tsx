import type { Tombstone } from "../../_contract";
import { Lead, Opening, Page } from "../../_ui/Page";

/** What stands at an identifier whose form was not accepted, for readers who may not see it. */
export function TombstoneArticle({ tombstone }: { tombstone: Tombstone }) {
  return (
    <Page>
      <Opening kicker={tombstone.version} title="No accepted form">
        <Lead>
          {tombstone.state === "checking"
            ? "The form submitted under this identifier is being checked."
            : "The form submitted under this identifier was not accepted. The number is never used again."}
        </Lead>
      </Opening>
    </Page>
  );
}
