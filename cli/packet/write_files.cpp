// SPDX-License-Identifier: MIT
#include "cli/packet/write_files.hpp"

#include <cerrno>
#include <cstring>
#include <fcntl.h>
#include <fmt/format.h>
#include <future>
#include <unistd.h>
#include <utility>

namespace dialwright::cli {
namespace {

[[noreturn]] void fail(const std::filesystem::path& path, int error) {
    throw WriteError(fmt::format("cannot write {}: {}", path.string(), std::strerror(error)));
}

/// A file while it is written; closed whatever happens.
class Written {
  public:
    Written(std::filesystem::path path, const std::string& bytes)
        : path_{std::move(path)}, file_{::open(path_.c_str(), O_WRONLY | O_CREAT | O_TRUNC | O_CLOEXEC, 0666)} {
        if (file_ < 0)
            fail(path_, errno);
        for (std::size_t done = 0; done < bytes.size();) {
            const ssize_t wrote = ::write(file_, bytes.data() + done, bytes.size() - done);
            if (wrote > 0) {
                done += std::size_t(wrote);
            } else if (wrote < 0 && errno != EINTR) {
                const int error = errno;
                ::close(file_);
                fail(path_, error);
            }
        }
    }
    Written(const Written&) = delete;
    Written& operator=(const Written&) = delete;
    Written(Written&& other) noexcept : path_{std::move(other.path_)}, file_{std::exchange(other.file_, -1)} {}
    Written& operator=(Written&&) = delete;
    ~Written() {
        if (file_ >= 0)
            ::close(file_);
    }

    /// Pushes it to the disk. A full disk may show only here, or on closing.
    void push() {
        int error = ::fdatasync(file_) != 0 && errno != EINVAL && errno != EROFS ? errno : 0;
        if (::close(std::exchange(file_, -1)) != 0 && error == 0)
            error = errno;
        if (error != 0)
            fail(path_, error);
    }

  private:
    std::filesystem::path path_;
    int file_;
};

/// Side by side: a disk's answer takes milliseconds, whether it is asked once or for twenty files at a time.
void push_all(std::vector<Written>& files) {
    std::vector<std::future<void>> pushed;
    for (Written& file : files)
        pushed.push_back(std::async(std::launch::async, [&file] { file.push(); }));
    for (std::future<void>& file : pushed) // one that has failed throws; the others have ended before that is heard of
        file.get();
}

/// Removes those that are empty.
void remove_folders(const std::vector<std::filesystem::path>& folders) {
    std::error_code ignored;
    for (auto folder = folders.rbegin(); folder != folders.rend(); ++folder)
        std::filesystem::remove(*folder, ignored);
}

/// Makes a folder and those above it.
/// @return the folders that were not there before, the uppermost first
std::vector<std::filesystem::path> make_folders(const std::filesystem::path& folder) {
    namespace fs = std::filesystem;
    std::vector<fs::path> made;
    fs::path so_far;
    for (const fs::path& part : folder) {
        so_far /= part;
        std::error_code trouble;
        if (fs::create_directory(so_far, trouble)) {
            made.push_back(so_far);
        } else if (std::error_code ignored; !fs::is_directory(so_far, ignored)) {
            remove_folders(made);
            fail(so_far, trouble && trouble.value() != EEXIST ? trouble.value() : ENOTDIR);
        }
    }
    return made;
}

} // namespace

void write_files(const std::filesystem::path& folder, const std::vector<OutputFile>& files) {
    namespace fs = std::filesystem;
    std::error_code trouble;
    const std::vector<fs::path> made = make_folders(folder);
    std::vector<fs::path> waiting;
    const auto put_back = [&] {
        std::error_code ignored;
        for (const fs::path& path : waiting)
            fs::remove(path, ignored);
        remove_folders(made);
    };
    try {
        std::vector<Written> written;
        for (const OutputFile& file : files) {
            const fs::path target = folder / file.name;
            if (fs::is_directory(target, trouble))
                fail(target, EISDIR);
            waiting.push_back(folder / fmt::format(".{}.{}.part", file.name, ::getpid()));
            written.emplace_back(waiting.back(), file.bytes);
        }
        push_all(written);
        for (std::size_t i = 0; i < files.size(); ++i)
            fs::rename(waiting[i], folder / files[i].name);
    } catch (const WriteError&) {
        put_back();
        throw;
    } catch (const fs::filesystem_error& error) {
        put_back();
        fail(folder, error.code().value());
    }
}

} // namespace dialwright::cli
