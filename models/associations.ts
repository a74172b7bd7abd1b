import "server-only";
import { Axis, MachineModel, MachineModelVersion, Site } from "./catalog";
import { Baseline, MachineBaseline } from "./changes";
import { Machine, MachineHardware, MachineStatus } from "./machines";
import { FileContent, Reading, Revision, RevisionFile } from "./revisions";

MachineModelVersion.hasMany(Axis, { as: "axes", foreignKey: "modelVersionId" });
Machine.belongsTo(MachineModel, { as: "model", foreignKey: "modelId" });
Machine.belongsTo(Site, { as: "site", foreignKey: "siteId" });
Machine.hasMany(MachineHardware, { as: "hardware", foreignKey: "machineId" });
Machine.hasOne(MachineStatus, { as: "status", foreignKey: "machineId" });
Revision.hasMany(RevisionFile, { as: "files", foreignKey: "revisionId" });
RevisionFile.belongsTo(FileContent, { as: "content", foreignKey: "sha256" });
Reading.belongsTo(Revision, { as: "revision", foreignKey: "revisionId" });
MachineBaseline.belongsTo(Baseline, { as: "baseline", foreignKey: "baselineId" });
