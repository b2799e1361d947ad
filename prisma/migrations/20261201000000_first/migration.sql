-- CreateTable
CREATE TABLE "Region" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "slug" TEXT NOT NULL,
    "name" TEXT NOT NULL,
    "invented" BOOLEAN NOT NULL DEFAULT false,
    "basis" TEXT NOT NULL DEFAULT '{}',
    "tileUrl" TEXT,
    "tileAttribution" TEXT,
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP
);

-- CreateTable
CREATE TABLE "Station" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "regionId" INTEGER NOT NULL,
    "code" TEXT NOT NULL,
    "name" TEXT NOT NULL,
    "river" TEXT NOT NULL DEFAULT '',
    "latitude" REAL,
    "longitude" REAL,
    "areaKm2" REAL,
    "influence" TEXT NOT NULL DEFAULT 'unknown',
    "changes" TEXT NOT NULL DEFAULT '[]',
    "notes" TEXT NOT NULL DEFAULT '',
    "createdBy" INTEGER,
    CONSTRAINT "Station_regionId_fkey" FOREIGN KEY ("regionId") REFERENCES "Region" ("id") ON DELETE CASCADE ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Layer" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "regionId" INTEGER NOT NULL,
    "name" TEXT NOT NULL,
    "kind" TEXT NOT NULL,
    "geojson" TEXT NOT NULL,
    "importId" INTEGER,
    CONSTRAINT "Layer_regionId_fkey" FOREIGN KEY ("regionId") REFERENCES "Region" ("id") ON DELETE CASCADE ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Basis" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "regionId" INTEGER NOT NULL,
    "name" TEXT NOT NULL,
    "json" TEXT NOT NULL,
    CONSTRAINT "Basis_regionId_fkey" FOREIGN KEY ("regionId") REFERENCES "Region" ("id") ON DELETE CASCADE ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Import" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "regionId" INTEGER NOT NULL,
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,
    "by" TEXT NOT NULL DEFAULT '',
    "kind" TEXT NOT NULL,
    "fileName" TEXT NOT NULL,
    "sha256" TEXT NOT NULL,
    "layout" TEXT NOT NULL DEFAULT '',
    "unit" TEXT NOT NULL DEFAULT '',
    "mapping" TEXT NOT NULL DEFAULT '{}',
    "rule" TEXT NOT NULL DEFAULT 'keep',
    "rows" INTEGER NOT NULL DEFAULT 0,
    "accepted" INTEGER NOT NULL DEFAULT 0,
    "rejected" INTEGER NOT NULL DEFAULT 0,
    "report" TEXT NOT NULL DEFAULT '{}',
    "before" TEXT NOT NULL DEFAULT '{}',
    "state" TEXT NOT NULL DEFAULT 'applied',
    "heartbeat" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,
    CONSTRAINT "Import_regionId_fkey" FOREIGN KEY ("regionId") REFERENCES "Region" ("id") ON DELETE CASCADE ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Part" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "importId" INTEGER NOT NULL,
    "stationId" INTEGER NOT NULL,
    "quantity" TEXT NOT NULL DEFAULT 'flow',
    "firstDay" INTEGER NOT NULL,
    "days" INTEGER NOT NULL,
    "unit" TEXT NOT NULL,
    "codeList" TEXT NOT NULL,
    "values" BLOB NOT NULL,
    "codes" BLOB NOT NULL,
    CONSTRAINT "Part_importId_fkey" FOREIGN KEY ("importId") REFERENCES "Import" ("id") ON DELETE CASCADE ON UPDATE CASCADE,
    CONSTRAINT "Part_stationId_fkey" FOREIGN KEY ("stationId") REFERENCES "Station" ("id") ON DELETE CASCADE ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Record" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "stationId" INTEGER NOT NULL,
    "quantity" TEXT NOT NULL DEFAULT 'flow',
    "partId" INTEGER,
    "laidId" INTEGER,
    "unit" TEXT NOT NULL,
    "firstDay" INTEGER NOT NULL,
    "days" INTEGER NOT NULL,
    "hash" TEXT NOT NULL,
    "valueCount" INTEGER NOT NULL,
    "firstValueDay" INTEGER,
    "lastValueDay" INTEGER,
    "zeroCount" INTEGER NOT NULL DEFAULT 0,
    CONSTRAINT "Record_stationId_fkey" FOREIGN KEY ("stationId") REFERENCES "Station" ("id") ON DELETE CASCADE ON UPDATE CASCADE,
    CONSTRAINT "Record_partId_fkey" FOREIGN KEY ("partId") REFERENCES "Part" ("id") ON DELETE SET NULL ON UPDATE CASCADE,
    CONSTRAINT "Record_laidId_fkey" FOREIGN KEY ("laidId") REFERENCES "Laid" ("id") ON DELETE SET NULL ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Laid" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "importId" INTEGER,
    "values" BLOB NOT NULL,
    "flags" BLOB NOT NULL
);

-- CreateTable
CREATE TABLE "Mark" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "stationId" INTEGER NOT NULL,
    "quantity" TEXT NOT NULL DEFAULT 'flow',
    "firstDay" INTEGER NOT NULL,
    "lastDay" INTEGER NOT NULL,
    "kind" TEXT NOT NULL,
    "reason" TEXT NOT NULL,
    "by" TEXT NOT NULL DEFAULT '',
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,
    CONSTRAINT "Mark_stationId_fkey" FOREIGN KEY ("stationId") REFERENCES "Station" ("id") ON DELETE CASCADE ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Job" (
    "id" TEXT NOT NULL PRIMARY KEY,
    "regionId" INTEGER,
    "kind" TEXT NOT NULL,
    "state" TEXT NOT NULL,
    "progress" TEXT NOT NULL DEFAULT '{}',
    "result" TEXT NOT NULL DEFAULT 'null',
    "error" TEXT,
    "heartbeat" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,
    "createdAt" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,
    "finishedAt" DATETIME,
    CONSTRAINT "Job_regionId_fkey" FOREIGN KEY ("regionId") REFERENCES "Region" ("id") ON DELETE CASCADE ON UPDATE CASCADE
);

-- CreateTable
CREATE TABLE "Result" (
    "id" INTEGER NOT NULL PRIMARY KEY AUTOINCREMENT,
    "kind" TEXT NOT NULL,
    "key" TEXT NOT NULL,
    "size" INTEGER NOT NULL,
    "lastUsed" DATETIME NOT NULL DEFAULT CURRENT_TIMESTAMP,
    "bytes" BLOB NOT NULL
);

-- CreateIndex
CREATE UNIQUE INDEX "Region_slug_key" ON "Region"("slug");

-- CreateIndex
CREATE UNIQUE INDEX "Station_regionId_code_key" ON "Station"("regionId", "code");

-- CreateIndex
CREATE UNIQUE INDEX "Layer_regionId_name_key" ON "Layer"("regionId", "name");

-- CreateIndex
CREATE UNIQUE INDEX "Basis_regionId_name_key" ON "Basis"("regionId", "name");

-- CreateIndex
CREATE INDEX "Import_regionId_idx" ON "Import"("regionId");

-- CreateIndex
CREATE INDEX "Part_importId_idx" ON "Part"("importId");

-- CreateIndex
CREATE INDEX "Part_stationId_quantity_idx" ON "Part"("stationId", "quantity");

-- CreateIndex
CREATE UNIQUE INDEX "Record_laidId_key" ON "Record"("laidId");

-- CreateIndex
CREATE INDEX "Record_partId_idx" ON "Record"("partId");

-- CreateIndex
CREATE UNIQUE INDEX "Record_stationId_quantity_key" ON "Record"("stationId", "quantity");

-- CreateIndex
CREATE INDEX "Mark_stationId_quantity_idx" ON "Mark"("stationId", "quantity");

-- CreateIndex
CREATE INDEX "Job_state_idx" ON "Job"("state");

-- CreateIndex
CREATE UNIQUE INDEX "Result_kind_key_key" ON "Result"("kind", "key");

-- CreateIndex
CREATE INDEX "Result_lastUsed_size_idx" ON "Result"("lastUsed", "size");
