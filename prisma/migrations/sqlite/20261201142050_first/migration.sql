-- CreateTable
CREATE TABLE "User" (
    "id" TEXT NOT NULL PRIMARY KEY,
    "name" TEXT NOT NULL,
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP
);

-- CreateTable
CREATE TABLE "Group" (
    "id" TEXT NOT NULL PRIMARY KEY,
    "name" TEXT NOT NULL,
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP
);

-- CreateTable
CREATE TABLE "Membership" (
    "userId" TEXT NOT NULL,
    "groupId" TEXT NOT NULL,
    "role" TEXT NOT NULL,

    PRIMARY KEY ("userId", "groupId"),
    CONSTRAINT "Membership_userId_fkey" FOREIGN KEY ("userId") REFERENCES "User" ("id") ON DELETE RESTRICT ON UPDATE CASCADE,
    CONSTRAINT "Membership_groupId_fkey" FOREIGN KEY ("groupId") REFERENCES "Group" ("id") ON DELETE RESTRICT ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Amplitude" (
    "key" TEXT NOT NULL PRIMARY KEY,
    "n" INTEGER,
    "k" INTEGER NOT NULL,
    "loops" INTEGER NOT NULL,
    "nextNumber" INTEGER NOT NULL DEFAULT 1,
    "revision" INTEGER NOT NULL DEFAULT 0
);

-- CreateTable
CREATE TABLE "Form" (
    "id" TEXT NOT NULL PRIMARY KEY,
    "handle" TEXT NOT NULL,
    "number" INTEGER,
    "amplitudeKey" TEXT NOT NULL,
    "rangeFrom" INTEGER NOT NULL,
    "rangeTo" INTEGER NOT NULL,
    "component" TEXT NOT NULL,
    "target" TEXT NOT NULL,
    "groupId" TEXT NOT NULL,
    "visibility" TEXT NOT NULL,
    "position" TEXT NOT NULL,
    "createdBy" TEXT NOT NULL,
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,
    CONSTRAINT "Form_amplitudeKey_fkey" FOREIGN KEY ("amplitudeKey") REFERENCES "Amplitude" ("key") ON DELETE RESTRICT ON UPDATE CASCADE,
    CONSTRAINT "Form_groupId_fkey" FOREIGN KEY ("groupId") REFERENCES "Group" ("id") ON DELETE RESTRICT ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Version" (
    "id" TEXT NOT NULL PRIMARY KEY,
    "formId" TEXT NOT NULL,
    "no" INTEGER NOT NULL,
    "latest" BOOLEAN NOT NULL,
    "digest" TEXT NOT NULL,
    "source" TEXT NOT NULL,
    "latex" TEXT NOT NULL,
    "firstLine" TEXT NOT NULL,
    "lines" INTEGER NOT NULL,
    "title" TEXT,
    "method" TEXT,
    "terms" INTEGER,
    "spurious" INTEGER,
    "state" TEXT NOT NULL,
    "basis" TEXT,
    "successorId" TEXT,
    "checkId" TEXT NOT NULL,
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,
    CONSTRAINT "Version_formId_fkey" FOREIGN KEY ("formId") REFERENCES "Form" ("id") ON DELETE RESTRICT ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Check" (
    "id" TEXT NOT NULL PRIMARY KEY,
    "versionId" TEXT,
    "userId" TEXT NOT NULL,
    "source" TEXT,
    "protocol" TEXT,
    "engine" TEXT,
    "seed" TEXT NOT NULL,
    "comparedDigests" TEXT,
    "verdict" TEXT,
    "report" TEXT,
    "certificate" TEXT,
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,
    "finishedAt" DATETIME,
    CONSTRAINT "Check_versionId_fkey" FOREIGN KEY ("versionId") REFERENCES "Version" ("id") ON DELETE SET NULL ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Job" (
    "checkId" TEXT NOT NULL PRIMARY KEY,
    "state" TEXT NOT NULL,
    "priority" INTEGER NOT NULL DEFAULT 0,
    "leaseUntil" DATETIME,
    "attempt" INTEGER NOT NULL DEFAULT 0,
    "failures" INTEGER NOT NULL DEFAULT 0,
    "cancel" BOOLEAN NOT NULL DEFAULT false,
    "stage" TEXT NOT NULL DEFAULT 'waiting',
    "done" INTEGER NOT NULL DEFAULT 0,
    "total" INTEGER NOT NULL DEFAULT 0,
    "seq" INTEGER NOT NULL DEFAULT 0,
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,
    CONSTRAINT "Job_checkId_fkey" FOREIGN KEY ("checkId") REFERENCES "Check" ("id") ON DELETE RESTRICT ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Comparison" (
    "checkId" TEXT NOT NULL,
    "no" INTEGER NOT NULL,
    "kind" TEXT NOT NULL,
    "with" TEXT NOT NULL,
    "versionId" TEXT,
    "agrees" BOOLEAN NOT NULL,
    "points" INTEGER NOT NULL,
    "primes" INTEGER NOT NULL,
    "bound" TEXT,
    "n" INTEGER,

    PRIMARY KEY ("checkId", "no"),
    CONSTRAINT "Comparison_checkId_fkey" FOREIGN KEY ("checkId") REFERENCES "Check" ("id") ON DELETE RESTRICT ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Mark" (
    "versionId" TEXT NOT NULL,
    "code" TEXT NOT NULL,
    "state" TEXT NOT NULL,
    "manifest" BOOLEAN,
    "subgroup" TEXT,
    "evidence" TEXT NOT NULL,

    PRIMARY KEY ("versionId", "code"),
    CONSTRAINT "Mark_versionId_fkey" FOREIGN KEY ("versionId") REFERENCES "Version" ("id") ON DELETE RESTRICT ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Fingerprint" (
    "scope" TEXT NOT NULL,
    "key" TEXT NOT NULL,
    "component" TEXT NOT NULL,
    "normalisation" TEXT NOT NULL,
    "hash" TEXT NOT NULL,
    "versionId" TEXT NOT NULL,
    "term" INTEGER NOT NULL,

    PRIMARY KEY ("versionId", "normalisation", "term"),
    CONSTRAINT "Fingerprint_versionId_fkey" FOREIGN KEY ("versionId") REFERENCES "Version" ("id") ON DELETE RESTRICT ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "SearchText" (
    "versionId" TEXT NOT NULL PRIMARY KEY,
    "scope" TEXT NOT NULL,
    "words" TEXT NOT NULL,
    CONSTRAINT "SearchText_versionId_fkey" FOREIGN KEY ("versionId") REFERENCES "Version" ("id") ON DELETE RESTRICT ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Idempotency" (
    "userId" TEXT NOT NULL,
    "route" TEXT NOT NULL,
    "key" TEXT NOT NULL,
    "bodyHash" TEXT NOT NULL,
    "reply" TEXT NOT NULL,
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,

    PRIMARY KEY ("userId", "route", "key")
);

-- CreateTable
CREATE TABLE "SeedDocument" (
    "path" TEXT NOT NULL PRIMARY KEY,
    "digest" TEXT NOT NULL,
    "formId" TEXT,
    "problem" TEXT
);

-- CreateIndex
CREATE INDEX "Membership_groupId_idx" ON "Membership"("groupId");

-- CreateIndex
CREATE INDEX "Amplitude_loops_k_idx" ON "Amplitude"("loops", "k");

-- CreateIndex
CREATE UNIQUE INDEX "Form_handle_key" ON "Form"("handle");

-- CreateIndex
CREATE UNIQUE INDEX "Form_position_key" ON "Form"("position");

-- CreateIndex
CREATE INDEX "Form_visibility_amplitudeKey_idx" ON "Form"("visibility", "amplitudeKey");

-- CreateIndex
CREATE INDEX "Form_groupId_idx" ON "Form"("groupId");

-- CreateIndex
CREATE UNIQUE INDEX "Form_amplitudeKey_number_key" ON "Form"("amplitudeKey", "number");

-- CreateIndex
CREATE UNIQUE INDEX "Version_checkId_key" ON "Version"("checkId");

-- CreateIndex
CREATE INDEX "Version_digest_idx" ON "Version"("digest");

-- CreateIndex
CREATE INDEX "Version_state_latest_idx" ON "Version"("state", "latest");

-- CreateIndex
CREATE UNIQUE INDEX "Version_formId_no_key" ON "Version"("formId", "no");

-- CreateIndex
CREATE INDEX "Check_versionId_idx" ON "Check"("versionId");

-- CreateIndex
CREATE INDEX "Check_userId_createdAt_idx" ON "Check"("userId", "createdAt");

-- CreateIndex
CREATE INDEX "Job_state_priority_leaseUntil_idx" ON "Job"("state", "priority", "leaseUntil");

-- CreateIndex
CREATE INDEX "Comparison_versionId_idx" ON "Comparison"("versionId");

-- CreateIndex
CREATE INDEX "Mark_code_state_versionId_idx" ON "Mark"("code", "state", "versionId");

-- CreateIndex
CREATE INDEX "Fingerprint_scope_key_component_normalisation_hash_idx" ON "Fingerprint"("scope", "key", "component", "normalisation", "hash");

-- CreateIndex
CREATE INDEX "SearchText_scope_idx" ON "SearchText"("scope");

-- CreateIndex
CREATE INDEX "Idempotency_createdAt_idx" ON "Idempotency"("createdAt");


-- Until there are accounts: the one user and the one group.
INSERT INTO "User" ("id", "name") VALUES ('local', 'Local user');
INSERT INTO "Group" ("id", "name") VALUES ('local', 'Local group');
INSERT INTO "Membership" ("userId", "groupId", "role") VALUES ('local', 'local', 'owner');
