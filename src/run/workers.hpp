#pragma once

#include <cstddef>
#include <functional>

namespace duskleaf {

/// Calls task(0) .. task(count - 1), each once, on `jobs` threads (0: one for each core). Returns
/// when all are done. A task must not throw.
void run_tasks(std::size_t count, int jobs, const std::function<void(std::size_t)>& task);

/// Whether the person asked to stop (Ctrl-C): tasks end after the file in hand. request_stop may be
/// called from a signal handler.
bool stop_requested();
void request_stop();

}  // namespace duskleaf
