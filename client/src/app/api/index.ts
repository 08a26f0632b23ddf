export { Api } from './api';
export { ApiFailure, toApiFailure, type FailureKind } from './api-failure';
export type { EndpointRequest, EndpointResponse } from './endpoint-request';
export { LiveEvents, OPEN_EVENT_SOURCE, onLiveEvent, reloadOnChange, type LiveState } from './live-events';
export { readEndpoint, type EndpointRead, type ReadState } from './read-endpoint';
