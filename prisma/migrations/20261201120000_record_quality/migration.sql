-- AlterTable
ALTER TABLE "Station" ADD COLUMN "namedFlows" TEXT NOT NULL DEFAULT '[]';

-- AlterTable
ALTER TABLE "Station" ADD COLUMN "derived" TEXT;

-- AlterTable
ALTER TABLE "Import" ADD COLUMN "revisions" TEXT NOT NULL DEFAULT 'null';

-- AlterTable
ALTER TABLE "Record" ADD COLUMN "checked" TEXT;

-- AlterTable
ALTER TABLE "Record" ADD COLUMN "suspect" TEXT;

-- CreateTable
CREATE TABLE "Link" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "regionId" INTEGER NOT NULL,
    "upstreamId" INTEGER NOT NULL,
    "downstreamId" INTEGER NOT NULL,
    "source" TEXT NOT NULL DEFAULT 'person',
    CONSTRAINT "Link_regionId_fkey" FOREIGN KEY ("regionId") REFERENCES "Region" ("id") ON DELETE CASCADE ON UPDATE CASCADE,
    CONSTRAINT "Link_upstreamId_fkey" FOREIGN KEY ("upstreamId") REFERENCES "Station" ("id") ON DELETE CASCADE ON UPDATE CASCADE,
    CONSTRAINT "Link_downstreamId_fkey" FOREIGN KEY ("downstreamId") REFERENCES "Station" ("id") ON DELETE CASCADE ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "SavedMapping" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "regionId" INTEGER NOT NULL,
    "name" TEXT NOT NULL,
    "json" TEXT NOT NULL,
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,
    CONSTRAINT "SavedMapping_regionId_fkey" FOREIGN KEY ("regionId") REFERENCES "Region" ("id") ON DELETE CASCADE ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Finding" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "stationId" INTEGER NOT NULL,
    "quantity" TEXT NOT NULL DEFAULT 'flow',
    "kind" TEXT NOT NULL,
    "firstDay" INTEGER NOT NULL,
    "lastDay" INTEGER NOT NULL,
    "days" INTEGER NOT NULL,
    "detail" TEXT NOT NULL DEFAULT '{}',
    CONSTRAINT "Finding_stationId_fkey" FOREIGN KEY ("stationId") REFERENCES "Station" ("id") ON DELETE CASCADE ON UPDATE CASCADE
);

-- CreateIndex
CREATE UNIQUE INDEX "Link_upstreamId_downstreamId_key" ON "Link"("upstreamId", "downstreamId");

-- CreateIndex
CREATE INDEX "Link_regionId_idx" ON "Link"("regionId");

-- CreateIndex
CREATE UNIQUE INDEX "SavedMapping_regionId_name_key" ON "SavedMapping"("regionId", "name");

-- CreateIndex
CREATE INDEX "Finding_stationId_quantity_idx" ON "Finding"("stationId", "quantity");
