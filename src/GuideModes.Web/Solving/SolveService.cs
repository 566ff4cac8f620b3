using GuideModes.Guides;
using GuideModes.Solvers;
using GuideModes.Solvers.Certification;

namespace GuideModes.Web.Solving;

/// <summary>The guide asks for more work than one request may have; the message is for the person who asked.</summary>
public sealed class WorkBudgetException(string message) : Exception(message);

/// <summary>Runs the engines on the thread pool: a few guides at a time, each within a stated time.</summary>
/// <remarks>The caller is answered within the budget even where an engine is slow to notice. Safe to share between threads; one per process.</remarks>
public sealed class SolveService : IDisposable
{
    /// <summary>How long one guide may take, its sampled fields included.</summary>
    public static readonly TimeSpan Budget = TimeSpan.FromSeconds(10);

    /// <summary>How long a request waits for its turn.</summary>
    public static readonly TimeSpan Patience = TimeSpan.FromSeconds(20);

    private readonly SemaphoreSlim _places = new(Math.Max(2, Environment.ProcessorCount));

    /// <exception cref="WorkBudgetException">The guide took longer than <see cref="Budget"/>, or the engines say it is too much.</exception>
    /// <exception cref="OperationCanceledException">The caller gave up.</exception>
    public Task<GuideAnswer> SolveAsync(Guide guide, CancellationToken cancellation = default) =>
        SolveAsync(guide, static (answer, _) => answer, cancellation);

    /// <summary>Solves a guide and shapes the answer, both within the budget.</summary>
    public async Task<T> SolveAsync<T>(Guide guide, Func<GuideAnswer, CancellationToken, T> shape, CancellationToken cancellation = default)
    {
        if (!await _places.WaitAsync(Patience, cancellation))
            throw new WorkBudgetException("Other guides are keeping the engines busy. Try again in a moment.");
        var limited = CancellationTokenSource.CreateLinkedTokenSource(cancellation);
        var limit = limited.Token;
        limited.CancelAfter(Budget);
        var work = Task.Run(() => shape(Checked(GuideAnswer.Solve(guide, limit)), limit), limit);
        _ = work.ContinueWith(ended => Free(ended, limited), CancellationToken.None, TaskContinuationOptions.ExecuteSynchronously, TaskScheduler.Default);
        try
        {
            return await work.WaitAsync(limit);
        }
        catch (OperationCanceledException) when (!cancellation.IsCancellationRequested)
        {
            throw new WorkBudgetException(
                $"This guide takes more than the {Budget.TotalSeconds:0} s that one guide may take. "
                + "Fewer regions, a smoother profile or a smaller ratio of thickness to wavelength make it lighter.");
        }
    }

    public void Dispose() => _places.Dispose();

    /// <summary>The place is free when the work has really ended, which may be a while after its caller was told.</summary>
    private void Free(Task ended, CancellationTokenSource limited)
    {
        _ = ended.Exception;
        limited.Dispose();
        _places.Release();
    }

    /// <summary>An answer that had to stop short is told as too much work, in the engines' own sentence.</summary>
    private static GuideAnswer Checked(GuideAnswer answer) => answer.Outcome == SearchOutcome.Complete
        ? answer
        : throw new WorkBudgetException(string.Join(' ', answer.Remarks));
}
