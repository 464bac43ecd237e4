// What other rooms may use of the campaign, its figure, parts, stages and wording.
export { finishStage, markPart, moveStage, publishCampaign } from './campaign-service.ts';
export {
  addAppealWording,
  addCampaign,
  addFigure,
  addInKindShare,
  addParts,
  addStages,
  type NewPart,
} from './campaign-setup.ts';
export {
  getAppealWording,
  getAppealWordingById,
  getCampaign,
  getDrawing,
  listParts,
  listStages,
  lockCampaign,
  type CampaignRecord,
  type PartRecord,
} from './campaign-store.ts';
