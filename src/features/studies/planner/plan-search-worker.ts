import { type SearchAsked, searchPlan } from './plan-search.ts';

self.addEventListener('message', ({ data }: MessageEvent<SearchAsked>) => self.postMessage(searchPlan(data)));
