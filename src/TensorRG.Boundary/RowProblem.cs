using System.Numerics;
using TensorRG.Tensors;

namespace TensorRG.Boundary;

/// <summary>
/// One round of the variational iteration for the dominant eigenvector of the row A[u, l, d, r]: environments of AL and AR, dominant vectors
/// of the maps of the centre and of the bond, new AL and AR from their polar factors (M. T. Fishman, L. Vanderstraeten,
/// V. Zauner-Stauber, J. Haegeman, F. Verstraete, Phys. Rev. B 98, 235148 (2018)).
/// </summary>
/// <typeparam name="T">Element type.</typeparam>
/// <param name="algebra">Contractions and kernels.</param>
/// <param name="row">The tensor of a vertex, largest element about 1.</param>
/// <param name="seed">Seed of the first environments.</param>
internal sealed class RowProblem<T>(TensorAlgebra<T> algebra, Tensor<T> row, long seed)
    where T : unmanaged, INumberBase<T>
{
    private const int KrylovDimension = 20;
    private const double SharpestTolerance = 2e-15;

    /// <summary>Residual of the inner eigenvectors over that of the state: 0.1 was measured not to converge, 0.001 saves few rounds.</summary>
    private const double InnerAccuracy = 1e-2;

    private readonly Channel<T> _channel = new(algebra);
    private Tensor<T>? _left;
    private Tensor<T>? _right;

    /// <summary>The state of the last round.</summary>
    public required UniformState<T> State { get; set; }

    /// <summary>The larger of |AC - AL C| and |AC - C AR| after the last round.</summary>
    public double Residual { get; private set; } = 1;

    /// <summary>How often a map was applied so far.</summary>
    public int Applications { get; private set; }

    /// <summary>Forgets the environments, after the bond has changed.</summary>
    public void Replace(UniformState<T> state)
    {
        State = state;
        _left = _right = null;
    }

    /// <summary>One round.</summary>
    public void Iterate()
    {
        double tolerance = Math.Max(SharpestTolerance, InnerAccuracy * Math.Min(1e-2, Residual));
        Environments(tolerance);
        Ritz<T>? center = null, bond = null;
        var solver = new Arnoldi<T>(KrylovDimension, restarts: 5);
        algebra.Kernels.RunEach(2, part =>
        {
            if (part == 0)
                center = solver.Dominant(x => _channel.Center(_left!, x, row, _right!), State.AC, tolerance);
            else
                bond = solver.Dominant(x => _channel.Bond(_left!, x, _right!), State.C, tolerance);
        });
        Applications += center!.Applications + bond!.Applications;
        Update(center.Vector, bond.Vector);
    }

    /// <summary>AC2 of the present state; needs a round before it.</summary>
    public Tensor<T> TwoVertices() => _channel.TwoVertices(_left!, State.AC, State.AR, row, _right!);

    private void Environments(double tolerance)
    {
        var solver = new Arnoldi<T>(KrylovDimension, restarts: 20);
        Ritz<T>? left = null, right = null;
        using Tensor<T> lowerLeft = State.AL.Conjugate(), lowerRight = State.AR.Conjugate();
        _left ??= VectorSpace.Random<T>([State.Bond, State.Bond.Dual, row.Legs[1].Dual], new RandomSequence(seed, 1));
        _right ??= VectorSpace.Random<T>([row.Legs[3].Dual, State.Bond, State.Bond.Dual], new RandomSequence(seed, 2));
        algebra.Kernels.RunEach(2, part =>
        {
            if (part == 0)
                left = solver.Dominant(x => _channel.Left(x, State.AL, row, lowerLeft), _left, tolerance);
            else
                right = solver.Dominant(x => _channel.Right(x, State.AR, row, lowerRight), _right, tolerance);
        });
        Applications += left!.Applications + right!.Applications;
        (_left, _right) = (left.Vector, right.Vector);
    }

    private void Update(Tensor<T> center, Tensor<T> bond)
    {
        Tensor<T>? al = null, ar = null;
        using Tensor<T> turn = UnitaryFactor.Of(algebra, bond, [0], [1]);
        using Tensor<T> conjugate = turn.Conjugate();
        algebra.Kernels.RunEach(2, part =>
        {
            if (part == 0)
            {
                using Tensor<T> polar = UnitaryFactor.Of(algebra, center, [0, 1], [2]);
                al = algebra.Contract(polar, [2], conjugate, [1]);
            }
            else
            {
                using Tensor<T> polar = UnitaryFactor.Of(algebra, center, [0], [1, 2]);
                ar = algebra.Contract(conjugate, [0], polar, [0]);
            }
        });
        State = new UniformState<T>(al!, ar!, center, bond);
        using Tensor<T> left = algebra.Contract(al!, [2], bond, [0]), right = algebra.Contract(bond, [1], ar!, [0]);
        VectorSpace.AddTo(left, center, -T.One);
        VectorSpace.AddTo(right, center, -T.One);
        Residual = Math.Max(VectorSpace.Norm(left), VectorSpace.Norm(right));
    }
}
