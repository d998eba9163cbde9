/// Work spread over the processors of this machine.
#pragma once

#include "engine/status.hpp"

namespace stillshed {

/// An executor over all processors (oneTBB). Starts no thread before it is used for two pieces of work or more.
[[nodiscard]] Executor parallel_executor();

}  // namespace stillshed
