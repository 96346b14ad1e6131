// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "storage/history.h"

#include <string>

namespace evenstroke::storage {

/// All or nothing: what was written since `begin` is taken back by the destructor unless committed.
/// Transactions may stand in each other; an inner one is a savepoint of the outer.
class Transaction
{
public:
    Transaction(History& history, std::string undone) : history_(history), undone_(std::move(undone)) {}
    ~Transaction();
    Transaction(const Transaction&) = delete;
    Transaction& operator=(const Transaction&) = delete;

    /// Takes the write lock at once, so that nothing can come between reading and writing.
    Done begin();
    Done commit();
    void roll_back();

private:
    History& history_;
    std::string undone_;
    bool open_ = false;
};

/// Several questions that must see the same state of the file. Ends with the object.
class ReadTransaction
{
public:
    explicit ReadTransaction(History& history);
    ~ReadTransaction();
    ReadTransaction(const ReadTransaction&) = delete;
    ReadTransaction& operator=(const ReadTransaction&) = delete;

private:
    History& history_;
    bool open_ = false;
};

} // namespace evenstroke::storage
