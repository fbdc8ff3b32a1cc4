import { registry } from "@/app/api/v1/registry"
import { nextMount } from "@/lib/api/next-mount"
export const { GET, POST, PATCH, DELETE, OPTIONS } = nextMount(registry)
